import AxeBuilder from '@axe-core/playwright';
import { expect, test, type Page } from '@playwright/test';
import type { Plot } from '../../src/lib/core/document';
import { signIn } from './helpers/sign-in';

// Many small steps each; a busy machine takes its time over them.
test.describe.configure({ timeout: 240_000 });

const boundaryFile = 'tests/fixtures/invented-boundary.geojson';
const skylineFile = 'tests/fixtures/invented-skyline.csv';

/** An empty project at the place that the fixtures are drawn round; answers its id. */
async function openEmptyPlot(page: Page, email = 'designer@tiltyard.test'): Promise<string> {
	await signIn(page, email);
	const response = await page.request.post('/api/v1/projects', {
		headers: { origin: new URL(page.url()).origin },
		data: {
			name: `Plot walk ${Date.now() % 100_000}`,
			place: { latitudeDeg: 41.2, longitudeDeg: 14.5, altitudeM: 420, timeZone: 'Europe/Rome' }
		}
	});
	expect(response.status(), await response.text()).toBe(201);
	const { id } = (await response.json()) as { id: string };
	await page.goto(`/projects/${id}/plot`);
	// The grid is drawn once the page is alive.
	await expect(plan(page).locator('path').first()).toBeAttached();
	return id;
}

const plan = (page: Page) => page.getByTestId('plot-plan');
const corners = (page: Page) => plan(page).locator('[data-corner]');

async function storedPlot(page: Page, projectId: string): Promise<Plot> {
	const response = await page.request.get(`/api/v1/projects/${projectId}/plot`);
	return ((await response.json()) as { document: Plot }).document;
}

async function upload(page: Page, file: string | { name: string; mimeType: string; buffer: Buffer }) {
	await page.getByTestId('plot-file').setInputFiles(file);
}

function geoJson(ring: number[][], name = 'land.geojson') {
	const text = JSON.stringify({ type: 'Polygon', coordinates: [ring] });
	return { name, mimeType: 'application/geo+json', buffer: Buffer.from(text) };
}

/** Clicks at shares of the plan's width and height. */
async function clickPlan(page: Page, across: number, down: number): Promise<void> {
	const box = (await plan(page).boundingBox())!;
	await page.mouse.click(box.x + box.width * across, box.y + box.height * down);
}

test('a boundary and a skyline come from files, are looked at first, and are there after a reload', async ({
	page
}) => {
	const projectId = await openEmptyPlot(page);
	await expect(page.getByRole('heading', { name: 'Begin with the land' })).toBeVisible();
	await upload(page, boundaryFile);
	const preview = page.getByTestId('boundary-preview');
	await expect(preview).toContainText(/m², \d+\sm east–west by \d+\sm north–south, 30 corners/);
	await expect(preview).toContainText('1 hole is kept');
	// Nothing has changed before it is accepted.
	expect((await storedPlot(page, projectId)).boundary).toEqual([]);
	await preview.getByRole('button', { name: 'Take this boundary' }).click();
	await expect(corners(page)).toHaveCount(30);

	await upload(page, skylineFile);
	const skyline = page.getByTestId('skyline-preview');
	await expect(skyline).toContainText('27 bearings; the skyline is highest at 085° with 7.8°');
	await expect(page.getByTestId('skyline-strip')).toBeVisible();
	await skyline.getByRole('button', { name: 'Take this skyline' }).click();
	await expect(page.getByRole('button', { name: /^Skyline/ })).toContainText('up to 7.8°');

	await expect.poll(async () => (await storedPlot(page, projectId)).skyline.length).toBe(27);
	await page.reload();
	await expect(corners(page)).toHaveCount(30);
	const stored = await storedPlot(page, projectId);
	expect(stored.boundary[0].outer.length).toBeGreaterThan(20);
	expect(stored.boundary[0].holes).toHaveLength(1);
	expect((await new AxeBuilder({ page }).analyze()).violations).toEqual([]);
});

test('files that can not be land are refused with a remedy, and the plot stays as it was', async ({
	page
}) => {
	const projectId = await openEmptyPlot(page);
	await upload(page, boundaryFile);
	await page.getByRole('button', { name: 'Take this boundary' }).click();
	await expect.poll(async () => (await storedPlot(page, projectId)).boundary.length).toBe(1);
	const before = await storedPlot(page, projectId);
	const refused = page.getByTestId('refused-file');

	await upload(page, geoJson([[14.5, 41.2], [14.501, 41.201], [14.501, 41.2], [14.5, 41.201], [14.5, 41.2]])); // prettier-ignore
	await expect(refused.getByRole('alert')).toContainText('crosses itself');
	await expect(refused.getByRole('alert')).toContainText('Move a corner');
	await upload(page, { name: 'scan.geojson', mimeType: '', buffer: Buffer.from([0x7b, 0xe8, 0x7d]) });
	await expect(refused.getByRole('alert')).toContainText('not written in UTF-8');
	await upload(page, { name: 'empty.json', mimeType: '', buffer: Buffer.from('') });
	await expect(refused.getByRole('alert')).toContainText('The file is empty');
	await upload(page, { name: 'big.geojson', mimeType: '', buffer: Buffer.alloc(12_000_000, 0x20) });
	await expect(refused.getByRole('alert')).toContainText('12 MB; at most 5 MB');
	await upload(page, { name: 'horizon.csv', mimeType: 'text/csv', buffer: Buffer.from('80;4,5\n90;oak\n') });
	await expect(refused.getByRole('alert')).toContainText('Row 2, column 2 (height) is "oak"');

	const swapped = [[41.2, 14.5], [41.2, 14.501], [41.201, 14.501], [41.2, 14.5]]; // prettier-ignore
	await upload(page, geoJson(swapped));
	await expect(refused.getByRole('alert')).toContainText('seem to be exchanged');
	await refused.getByRole('button', { name: 'Swap and look' }).click();
	await expect(page.getByTestId('boundary-preview')).toContainText('3 corners');
	await page.getByRole('button', { name: 'Discard' }).click();

	await expect(corners(page)).toHaveCount(30);
	expect(await storedPlot(page, projectId)).toEqual(before);
});

test('a boundary is drawn, its corners moved by number and by hand, and undone', async ({ page }) => {
	const projectId = await openEmptyPlot(page);
	await page.getByRole('button', { name: 'Draw the boundary' }).click();
	const card = page.getByRole('region', { name: 'Draw the boundary' });
	for (const [east, north] of [
		['0', '0'],
		['60,5', '0'],
		['60.5', '30+10']
	]) {
		await card.getByLabel('East').fill(east);
		await card.getByLabel('North').fill(north);
		await card.getByRole('button', { name: 'Add' }).click();
	}
	await clickPlan(page, 0.3, 0.3);
	await expect(card).toContainText('4 corners');
	await plan(page).focus();
	await page.keyboard.press('Backspace');
	await expect(card).toContainText('3 corners');
	await page.keyboard.press('Enter');
	await expect(corners(page)).toHaveCount(3);
	await expect.poll(async () => (await storedPlot(page, projectId)).boundary[0]?.outer).toEqual([[0, 0], [60.5, 0], [60.5, 40]]); // prettier-ignore

	const boundary = page.getByRole('region', { name: 'Boundary' });
	await boundary.getByRole('button', { name: 'Insert a corner after 3' }).click();
	await expect(corners(page)).toHaveCount(4);
	const east = boundary.getByLabel('Corner 4, east');
	await east.fill('-10');
	await east.press('Enter');
	// A value that makes the outline cross itself stays in its field, with the reason; the outline keeps its corner.
	await boundary.getByLabel('Corner 4, north').fill('-300');
	await boundary.getByLabel('Corner 4, north').press('Enter');
	await expect(boundary.getByRole('alert')).toContainText(/crosses itself|touches itself/);
	await expect(boundary.getByLabel('Corner 4, north')).toHaveValue('-300.00');
	await expect.poll(async () => (await storedPlot(page, projectId)).boundary[0]?.outer[3]).toEqual([-10, 20]);

	const corner = (await corners(page).nth(1).boundingBox())!;
	await page.mouse.move(corner.x + corner.width / 2, corner.y + corner.height / 2);
	await page.mouse.down();
	await page.mouse.move(corner.x + corner.width / 2 + 25, corner.y + corner.height / 2 + 10, { steps: 4 });
	await page.mouse.up();
	await expect.poll(async () => (await storedPlot(page, projectId)).boundary[0]?.outer[1][0]).toBeGreaterThan(61); // prettier-ignore
	await page.getByRole('button', { name: 'Undo: Move a corner' }).click();
	await expect.poll(async () => (await storedPlot(page, projectId)).boundary[0]?.outer[1]).toEqual([60.5, 0]);
	await page.getByRole('button', { name: /^Redo/ }).click();
	await expect.poll(async () => (await storedPlot(page, projectId)).boundary[0]?.outer[1][0]).toBeGreaterThan(61); // prettier-ignore
});

test('ground, set-back and obstacles are set in exact numbers and drawn', async ({ page }) => {
	const projectId = await openEmptyPlot(page);
	await page.getByRole('button', { name: 'Load a sample' }).click();
	await page.getByRole('button', { name: 'Take this boundary' }).click();
	await page.getByLabel('Set-back').fill('4,5');
	await page.getByLabel('Set-back').press('Enter');

	await page.getByRole('button', { name: /^Ground/ }).click();
	await page.getByRole('button', { name: 'Sloping plane' }).click();
	await page.getByLabel('Rise', { exact: true }).fill('9');
	await page.getByLabel('Rise', { exact: true }).press('Enter');
	await page.getByLabel('Rises towards').fill('90');
	await page.getByLabel('Rises towards').press('Enter');
	// 129.5 m east–west at 9 m in 100 m.
	await expect(page.getByTestId('ground-range')).toContainText(/11\.7\sm of height/);
	await page.getByLabel('Rise', { exact: true }).fill('95');
	await page.getByLabel('Rise', { exact: true }).press('Enter');
	await expect(page.getByText('Write a value from 0 % to 60 %.')).toBeVisible();
	await expect(page.getByLabel('Rise', { exact: true })).toHaveValue('95');

	await page.getByRole('button', { name: 'Place tree' }).click();
	await clickPlan(page, 0.25, 0.6);
	const card = page.getByTestId('obstacle-card');
	await card.getByLabel('Growth').fill('0.4');
	await card.getByLabel('Growth').press('Enter');
	await expect(page.getByText(/In 10 years:/)).toContainText(/13\.0\sm/);
	await page.getByRole('button', { name: 'Place box' }).click();
	await clickPlan(page, 0.35, 0.75);
	await page.getByTestId('obstacle-card').getByLabel('Height').fill('6');
	await page.getByTestId('obstacle-card').getByLabel('Height').press('Enter');
	await expect(plan(page).locator('[data-obstacle]')).toHaveCount(2);

	await expect.poll(async () => (await storedPlot(page, projectId)).obstacles.map((one) => [one.kind, one.heightM])).toEqual([['tree', 9], ['box', 6]]); // prettier-ignore
	const stored = await storedPlot(page, projectId);
	expect(stored.setBackM).toBe(4.5);
	expect(stored.ground).toEqual({ kind: 'plane', heightM: 0, risePercent: 9, riseTowardsDeg: 90 });
	await page.getByRole('button', { name: 'Delete' }).click();
	await expect(plan(page).locator('[data-obstacle]')).toHaveCount(1);
	await page.reload();
	await expect(page.getByRole('button', { name: /^Obstacles/ })).toContainText('1');
});

test('a building and a wall are drawn by their corners, and measured heights are pasted with an error first', async ({
	page
}) => {
	const projectId = await openEmptyPlot(page);
	await page.getByRole('button', { name: 'Load a sample' }).click();
	await page.getByRole('button', { name: 'Take this boundary' }).click();
	const draw = async (verb: string, points: [string, string][], done: string) => {
		await page.getByRole('button', { name: /^Obstacles/ }).click();
		await page.getByRole('button', { name: verb }).click();
		const card = page.getByRole('region', { name: verb });
		for (const [east, north] of points) {
			await card.getByLabel('East').fill(east);
			await card.getByLabel('North').fill(north);
			await card.getByRole('button', { name: 'Add' }).click();
		}
		await card.getByRole('button', { name: done }).click();
		return page.getByTestId('obstacle-card');
	};
	const corners: [string, string][] = [['0', '0'], ['12', '0'], ['12', '8'], ['0', '8']]; // prettier-ignore
	const building = await draw('Draw a building', corners, 'Close the footprint');
	await building.getByLabel('Roof').selectOption('pitched');
	await building.getByLabel('Height to the eaves').fill('4,5');
	await building.getByLabel('Height to the eaves').press('Enter');
	await page.getByRole('button', { name: 'All obstacles' }).click();
	await page.getByRole('button', { name: 'Close' }).first().click();
	const wall = await draw('Draw a wall or fence', [['-20', '-5'], ['-20', '15']], 'End the line'); // prettier-ignore
	await wall.getByLabel('Height').fill('500');
	await wall.getByLabel('Height').press('Enter');
	await expect(page.getByText(/^Write a value from 0\.01.m to 100.m\.$/)).toBeVisible();
	await wall.getByLabel('Height').fill('2.2');
	await wall.getByLabel('Height').press('Enter');
	await expect.poll(async () => (await storedPlot(page, projectId)).obstacles.map((one) => [one.kind, one.heightM])).toEqual([['building', 4.5], ['wall', 2.2]]); // prettier-ignore
	await expect(plan(page).locator('[data-obstacle]')).toHaveCount(2);

	await page.getByRole('button', { name: /^Ground/ }).click();
	await page.getByRole('button', { name: 'Measured' }).click();
	const heights = page.getByLabel('Heights', { exact: true });
	const take = page.getByRole('button', { name: 'Take these heights' });
	await heights.fill('-80 -80 1\n80 -80\n80 80 9\n-80 80 5');
	await expect(page.getByText('Line 2: 2 values: give east, north and height.')).toBeVisible();
	await expect(take).toBeDisabled();
	await expect(heights).toHaveValue(/80 80 9/);
	await heights.fill('-80 -80 1\n80 -80 5\n80 80 9\n-80 80 5');
	await expect(page.getByTestId('heights-preview')).toContainText(
		/4 heights over 160\sm by\s+160\sm, from 1\.0\sm to\s+9\.0\sm/
	);
	await take.click();
	await expect.poll(async () => (await storedPlot(page, projectId)).ground.kind).toBe('points');
	await expect(page.getByTestId('ground-range')).toContainText('4 heights');
	expect((await new AxeBuilder({ page }).analyze()).violations).toEqual([]);
});
