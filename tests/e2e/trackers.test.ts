import AxeBuilder from '@axe-core/playwright';
import { expect, test, type Page } from '@playwright/test';
import { signIn } from './helpers/sign-in';
import { makeSmallField, moveFirstTracker, storedLayout, type SmallField } from './helpers/small-field';

/** A field of two rows of three at 12 m by 11 m, opened in the plan view. */
async function openPlan(page: Page): Promise<SmallField> {
	await signIn(page, 'designer@tiltyard.test');
	const field = await makeSmallField(page, { risePercent: 0 });
	await page.goto(`/projects/${field.projectId}/trackers`);
	await lookAtPlan(page);
	return field;
}

/** Waits until the page runs, then takes the plan view: it needs no graphics card and is quick everywhere. */
async function lookAtPlan(page: Page): Promise<void> {
	await expect(page.locator('[data-sheet][data-alive]')).toBeVisible();
	await page.getByRole('button', { name: 'Plan', exact: true }).click();
	await expect(foot(page, 'A01')).toBeVisible();
}

const foot = (page: Page, tag: string) => page.locator(`[data-foot="${tag}"]`);
const count = (page: Page) => page.locator('[data-figure="count"]');
const inspector = (page: Page) => page.locator('[data-inspector]');
const saveState = (page: Page) => page.getByRole('status').filter({ hasText: 'revision' });

async function placeOf(page: Page, tag: string): Promise<{ x: number; y: number }> {
	const box = (await foot(page, tag).boundingBox())!;
	return { x: box.x + box.width / 2, y: box.y + box.height / 2 };
}

/** A plain click is tried again while the page still settles into its size; a second one changes nothing. */
async function clickTracker(page: Page, tag: string): Promise<void> {
	await expect(async () => {
		const { x, y } = await placeOf(page, tag);
		await page.mouse.click(x, y);
		await expect(page.getByRole('heading', { name: tag })).toBeVisible({ timeout: 2000 });
	}).toPass();
}

async function eastOf(page: Page, field: SmallField, tag: string): Promise<number | undefined> {
	const { trackers } = await storedLayout(page, field.layoutId);
	return trackers.find((tracker) => tracker.tag === tag)?.eastM;
}

test('exact numbers take a sum, are saved by themselves, and undo and redo bring them back', async ({
	page
}) => {
	const field = await openPlan(page);
	await clickTracker(page, 'A02');
	await expect(page.getByRole('heading', { name: 'A02' })).toBeVisible();
	const east = inspector(page).getByLabel('East');
	await expect(east).toHaveValue('12.00');
	await east.fill('12+0,75');
	await east.press('Enter');
	await expect(east).toHaveValue('12.75');
	await expect.poll(() => eastOf(page, field, 'A02')).toBe(12.75);
	await expect(saveState(page)).toContainText('Saved');

	await page.getByRole('button', { name: 'Undo: Move A02' }).click();
	await expect(east).toHaveValue('12.00');
	await page.getByRole('button', { name: 'Redo: Move A02' }).click();
	await expect(east).toHaveValue('12.75');

	// Refused, and what was typed is still there.
	await east.fill('twelve');
	await east.press('Enter');
	await expect(inspector(page).getByRole('alert')).toBeVisible();
	await expect(east).toHaveValue('twelve');
});

test('a changed axis height says who sizes poles and bases', async ({ page }) => {
	await openPlan(page);
	await clickTracker(page, 'B01');
	await inspector(page).getByLabel('Axis height').fill('3.1');
	await inspector(page).getByLabel('Axis height').press('Enter');
	await expect(inspector(page)).toContainText('Poles and bases are sized by a licensed engineer');
});

test('dragging moves a tracker in one undo step; Escape gives a drag up', async ({ page }) => {
	const field = await openPlan(page);
	const from = await placeOf(page, 'A03');
	await page.mouse.move(from.x, from.y);
	await page.mouse.down();
	await page.mouse.move(from.x + 30, from.y - 8, { steps: 4 });
	await page.mouse.move(from.x + 61, from.y - 13, { steps: 4 });
	await page.mouse.up();
	await expect(page.getByRole('heading', { name: 'A03' })).toBeVisible();
	await expect.poll(() => eastOf(page, field, 'A03')).toBeGreaterThan(25);
	await page.keyboard.press('Control+z');
	await expect(inspector(page).getByLabel('East')).toHaveValue('24.00');
	await expect(page.getByRole('button', { name: 'Undo', exact: true })).toBeDisabled();

	const again = await placeOf(page, 'A03');
	await page.mouse.move(again.x, again.y);
	await page.mouse.down();
	await page.mouse.move(again.x + 70, again.y + 21, { steps: 5 });
	await expect(inspector(page).getByLabel('East')).not.toHaveValue('24.00');
	await page.keyboard.press('Escape');
	await page.mouse.up();
	await expect(inspector(page).getByLabel('East')).toHaveValue('24.00');
});

test('a tracker too near to another is placed, and the finding says so and leads there', async ({ page }) => {
	await openPlan(page);
	await expect(page.locator('[data-figure="findings"]')).toHaveText('no layout findings');
	await clickTracker(page, 'B02');
	const east = inspector(page).getByLabel('East');
	await east.fill('4');
	await east.press('Enter');
	await expect(inspector(page)).toContainText('reach circles overlap');
	await expect(page.locator('[data-figure="findings"]')).toHaveText('1 layout finding');
	// The list opens over the card of what is selected.
	await page.locator('[data-figure="findings"]').click();
	await expect(inspector(page)).toHaveCount(0);
	await page.getByRole('button', { name: /B01 and B02: reach circles overlap/ }).click();
	await expect(page.getByRole('heading', { name: '2 trackers' })).toBeVisible();
});

test('one is placed by a click, a row by a drag, and tags follow', async ({ page }) => {
	const field = await openPlan(page);
	const corner = await placeOf(page, 'B03');
	const apart = corner.x - (await placeOf(page, 'B02')).x;
	await page.getByRole('button', { name: 'Place', exact: true }).click();
	await page.mouse.move(corner.x + apart - 40, corner.y + 2);
	await page.mouse.move(corner.x + apart, corner.y + 2);
	await expect(page.locator('[data-ghost]')).toHaveCount(1);
	await page.mouse.click(corner.x + apart, corner.y + 2);
	await expect(count(page)).toContainText('7 trackers');
	// It joins row B and falls into its line.
	await expect(foot(page, 'B04')).toBeVisible();
	await expect
		.poll(
			async () => (await storedLayout(page, field.layoutId)).trackers.find((t) => t.tag === 'B04')?.northM
		)
		.toBe(-11);

	await page.getByRole('button', { name: 'Row', exact: true }).click();
	await page.getByRole('button', { name: 'By count' }).click();
	await page.getByLabel('Trackers in the row').fill('3');
	await page.getByLabel('Trackers in the row').press('Enter');
	const start = await placeOf(page, 'B01');
	await page.mouse.move(start.x, start.y + apart);
	await page.mouse.down();
	await page.mouse.move(start.x + apart, start.y + apart, { steps: 4 });
	await page.mouse.move(start.x + 2 * apart, start.y + apart, { steps: 4 });
	await expect(page.locator('[data-ghost]')).toHaveCount(3);
	await page.mouse.up();
	await expect(count(page)).toContainText('10 trackers');
	await expect(foot(page, 'C03')).toBeVisible();
	await page.keyboard.press('Control+z');
	await expect(count(page)).toContainText('7 trackers');
});

test('the plot is filled as the card foretells, and undo brings back what stood', async ({ page }) => {
	const field = await openPlan(page);
	await page.getByRole('button', { name: 'Fill', exact: true }).click();
	const card = page.locator('[data-fill]');
	await card.getByLabel('Pitch E–W').fill('14');
	await card.getByLabel('Pitch E–W').press('Enter');
	await card.getByLabel(/^Replace the 6/).check();
	await expect(card.getByText(/^\d+\.\d\s%$/)).toBeVisible();
	const foretold = await card.locator('[data-figure="fill-count"]').innerText();
	expect(Number(foretold)).toBeGreaterThan(6);
	await card.getByRole('button', { name: `Place ${foretold} trackers` }).click();
	await expect(count(page)).toContainText(`${foretold} trackers`);
	await expect(page.locator('[data-figure="findings"]')).toHaveText('no layout findings');
	await expect
		.poll(async () => (await storedLayout(page, field.layoutId)).trackers.length)
		.toBe(Number(foretold));
	await page.getByRole('button', { name: /^Undo: Fill the plot/ }).click();
	await expect(count(page)).toContainText('6 trackers');
});

test('keys select, nudge, duplicate and delete; several are edited at once', async ({ page }) => {
	const field = await openPlan(page);
	await clickTracker(page, 'A01');
	await page.keyboard.press('ArrowRight');
	await page.keyboard.press('ArrowRight');
	await page.keyboard.press('Shift+ArrowRight');
	await expect(inspector(page).getByLabel('East')).toHaveValue('1.20');
	await expect.poll(() => eastOf(page, field, 'A01')).toBe(1.2);
	const second = await placeOf(page, 'A02');
	await page.keyboard.down('Shift');
	await page.mouse.click(second.x, second.y);
	await page.keyboard.up('Shift');
	await expect(page.getByRole('heading', { name: '2 trackers' })).toBeVisible();
	await inspector(page).getByLabel('Posture').selectOption('flat');
	await expect
		.poll(
			async () =>
				(await storedLayout(page, field.layoutId)).trackers.filter((t) => t.posture.kind === 'flat').length
		)
		.toBe(2);
	await inspector(page).getByLabel('Posture').blur();
	await page.keyboard.press('Control+a');
	await expect(page.getByRole('heading', { name: '6 trackers' })).toBeVisible();
	await page.keyboard.press('Delete');
	await expect(page.getByRole('heading', { name: 'No tracker stands here yet' })).toBeVisible();
	await page.keyboard.press('Control+z');
	await expect(count(page)).toContainText('6 trackers');
});

test('the table does by keyboard what the plan does by pointer, and the page has no axe finding', async ({
	page
}) => {
	const field = await openPlan(page);
	await page.getByRole('button', { name: 'Table', exact: true }).click();
	const north = page.getByLabel('North of B03');
	await north.focus();
	await north.fill('-12.5');
	await north.press('Enter');
	await expect
		.poll(
			async () => (await storedLayout(page, field.layoutId)).trackers.find((t) => t.tag === 'B03')?.northM
		)
		.toBe(-12.5);
	await page.getByRole('button', { name: 'Add a tracker' }).click();
	await expect(page.getByLabel('North of B04')).toHaveValue('-12.50');
	await page.getByRole('button', { name: 'Renumber all' }).click();
	await page.getByRole('button', { name: 'Undo: Renumber all' }).click();
	await page.getByRole('checkbox', { name: 'Select B04' }).uncheck();
	await page.getByRole('checkbox', { name: 'Select B03' }).check();
	await expect(page.getByRole('heading', { name: 'B03' })).toBeVisible();
	expect((await new AxeBuilder({ page }).analyze()).violations).toEqual([]);
	await page.getByRole('button', { name: 'Plan', exact: true }).click();
	expect((await new AxeBuilder({ page }).analyze()).violations).toEqual([]);
});

test('nothing is lost when the connection is, nor over a reload', async ({ page }) => {
	const field = await openPlan(page);
	await page.route('**/api/v1/layouts/*', (route) =>
		route.request().method() === 'PUT' ? route.abort('internetdisconnected') : route.continue()
	);
	await clickTracker(page, 'A01');
	const east = inspector(page).getByLabel('East');
	await east.fill('-2.5');
	await east.press('Enter');
	await expect(page.getByText('Offline, kept on this device')).toBeVisible();
	expect(await eastOf(page, field, 'A01')).toBe(0);

	await page.reload();
	await lookAtPlan(page);
	await clickTracker(page, 'A01');
	await expect(inspector(page).getByLabel('East')).toHaveValue('-2.50');

	await page.unroute('**/api/v1/layouts/*');
	await page.evaluate(() => window.dispatchEvent(new Event('online')));
	await expect.poll(() => eastOf(page, field, 'A01')).toBe(-2.5);
	await expect(saveState(page)).toContainText('Saved');
});

for (const [choice, expected] of [
	['Take theirs', -3],
	['Keep mine', 5]
] as const) {
	test(`a stale save asks, says what differs, and does what is chosen: ${choice}`, async ({ page }) => {
		const field = await openPlan(page);
		await moveFirstTracker(page, field.layoutId);
		await clickTracker(page, 'A01');
		const east = inspector(page).getByLabel('East');
		await east.fill('5');
		await east.press('Enter');
		const dialog = page.getByRole('dialog', { name: 'Changed in another window meanwhile' });
		await expect(dialog).toContainText(/Places differ: A01 by 8.0\sm/);
		await expect(dialog.getByRole('button', { name: 'Keep both' })).toHaveCount(0);
		await dialog.getByRole('button', { name: choice }).click();
		await expect(dialog).toBeHidden();
		await expect.poll(() => eastOf(page, field, 'A01')).toBe(expected);
		await expect(saveState(page)).toContainText('Saved');
		await expect(east).toHaveValue(expected.toFixed(2));
	});
}

test('what each side moved goes on when both moved different trackers', async ({ page }) => {
	const field = await openPlan(page);
	await moveFirstTracker(page, field.layoutId);
	await clickTracker(page, 'B02');
	const east = inspector(page).getByLabel('East');
	await east.fill('14');
	await east.press('Enter');
	const dialog = page.getByRole('dialog', { name: 'Changed in another window meanwhile' });
	await expect(dialog).toContainText('saved by you in another window at');
	await dialog.getByRole('button', { name: 'Keep both' }).click();
	await expect(dialog).toBeHidden();
	await expect.poll(() => eastOf(page, field, 'B02')).toBe(14);
	expect(await eastOf(page, field, 'A01')).toBe(-3);
	await expect(saveState(page)).toContainText('Saved');
});

test('a window that lay aside takes over what was saved elsewhere', async ({ page }) => {
	const field = await openPlan(page);
	await moveFirstTracker(page, field.layoutId);
	await page.evaluate(() => window.dispatchEvent(new Event('focus')));
	await expect(
		page.getByText(/A newer version, saved by you in another window at .*, is shown now/)
	).toBeVisible();
	await clickTracker(page, 'A01');
	await expect(inspector(page).getByLabel('East')).toHaveValue('-3.00');
});

test('a fill that can’t stand is refused, and its field is gone to', async ({ page }) => {
	await openPlan(page);
	await page.getByRole('button', { name: 'Fill', exact: true }).click();
	const card = page.locator('[data-fill]');
	const pitch = card.getByLabel('Pitch E–W');
	for (const [typed, reason] of [
		['abc', 'not a number'],
		['2', 'Reach circles would overlap: give 7.57 m or more.']
	]) {
		await pitch.fill(typed);
		await card.getByLabel('Turn').focus();
		await expect(card.getByRole('alert')).toContainText(reason);
		await expect(card.locator('[data-figure="fill-count"]')).toHaveText('–');
		await card.getByRole('button', { name: 'Correct the marked field' }).click();
		await expect(pitch).toBeFocused();
	}
	await pitch.fill('14');
	await pitch.press('Enter');
	await expect(card.getByRole('button', { name: /^Place \d+ trackers/ })).toBeVisible();
	await expect(count(page)).toContainText('6 trackers');
});

test('a low corner is raised from the findings in one step', async ({ page }) => {
	await openPlan(page);
	await clickTracker(page, 'B01');
	const axis = inspector(page).getByLabel('Axis height');
	await axis.fill('2.3');
	await axis.press('Enter');
	await page.locator('[data-figure="findings"]').click();
	await page.getByRole('button', { name: 'Raise it to 2.50 m' }).click();
	await expect(page.locator('[data-figure="findings"]')).toHaveText('no layout findings');
	await page.getByRole('button', { name: 'Undo: Raise 1 tracker to 2.50 m' }).click();
	await expect(page.locator('[data-figure="findings"]')).toHaveText('1 layout finding');
	await expect(page.getByText('Undone: Raise 1 tracker to 2.50 m.')).toBeAttached();
});

test('the 3D view and the look from the sun open on the same layout', async ({ page }) => {
	await openPlan(page);
	await clickTracker(page, 'A02');
	await page.getByRole('button', { name: '3D', exact: true }).click();
	await expect(page.getByRole('img', { name: 'The layout in 3D: 6 trackers' })).toBeVisible();
	await expect(page.getByRole('heading', { name: 'A02' })).toBeVisible();
	await page.getByRole('button', { name: 'Sun’s eye' }).click();
	await expect(page.getByRole('img', { name: /as the sun sees it/ })).toBeVisible();
});
