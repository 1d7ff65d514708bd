import { execFileSync } from 'node:child_process';
import { readFile } from 'node:fs/promises';
import { expect, test, type Page } from '@playwright/test';

// The whole job on the pages, from a stranger to a plan in the crew's hands; nothing is prepared through the API.
test.describe.configure({ timeout: 420_000 });

const boundaryFile = 'tests/fixtures/invented-boundary.geojson';
const skylineFile = 'tests/fixtures/invented-skyline.csv';

const step = (page: Page, name: string) =>
	page.getByRole('navigation', { name: 'Trail' }).getByRole('link', { name: new RegExp(`^${name}`) });

async function write(page: Page, label: string, text: string) {
	const field = page.getByLabel(label, { exact: true });
	await field.fill(text);
	await field.press('Enter');
}

async function saved(page: Page) {
	await expect(page.getByRole('status').filter({ hasText: 'revision' })).toContainText('Saved');
}

test('from signing up to a plan: land, trackers, shade, sensors, paper', async ({ page }, info) => {
	await page.goto('/sign-up');
	await page.getByLabel('Your name').fill('Nives Aldobran');
	await page.getByLabel('Team').fill('Aldobran Fields');
	await page.getByLabel('E-mail').fill(`nives-${Date.now().toString(36)}@tiltyard.test`);
	await page.getByLabel('Password').fill('long violet shadows');
	await page.getByRole('button', { name: 'Make the account' }).click();
	await page.getByRole('link', { name: 'New project' }).click();
	await page.getByLabel('Name of the project').fill('Prà Lungo');
	await page.getByLabel('Place').fill('41,2000° N; 14,5000° E');
	await expect(page.getByLabel('Time zone')).toHaveValue('Europe/Rome');
	await page.getByRole('button', { name: 'Open project' }).click();

	// Plot: a boundary of 26 corners with a hole, a skyline, a slope.
	await expect(page).toHaveURL(/\/plot/);
	await expect(page.getByTestId('plot-plan').locator('path').first()).toBeAttached();
	await page.getByTestId('plot-file').setInputFiles(boundaryFile);
	await expect(page.getByTestId('boundary-preview')).toContainText('30 corners');
	await page.getByRole('button', { name: 'Take this boundary' }).click();
	await page.getByTestId('plot-file').setInputFiles(skylineFile);
	await page.getByRole('button', { name: 'Take this skyline' }).click();
	await page.getByRole('button', { name: /^Ground/ }).click();
	await page.getByRole('button', { name: 'Sloping plane' }).click();
	await write(page, 'Rise', '6');
	await write(page, 'Rises towards', '90');
	await saved(page);

	// Trackers: the plot is filled, one is moved by an exact number.
	await step(page, 'Trackers').click();
	await expect(page.locator('[data-sheet][data-alive]')).toBeVisible();
	await page.getByRole('button', { name: 'Plan', exact: true }).click();
	await page.getByRole('button', { name: 'Fill', exact: true }).click();
	const fill = page.locator('[data-fill]');
	await expect(fill.locator('[data-figure="fill-count"]')).toHaveText(/^[1-9]\d*$/);
	const count = Number(await fill.locator('[data-figure="fill-count"]').innerText());
	expect(count).toBeGreaterThan(5);
	await fill.getByRole('button', { name: `Place ${count} trackers` }).click();
	await expect(page.locator('[data-figure="count"]')).toContainText(`${count} trackers`);
	await saved(page);

	// Shade: the shortest day at once, the year as a stored run.
	await step(page, 'Shade').click();
	await expect(page.getByTestId('verdict')).toContainText(/^(Met|Not met): /);
	await page.getByRole('button', { name: 'Compute the year' }).click();
	await expect(page.getByTestId('year-result')).toBeVisible({ timeout: 90_000 });
	const loss = await page.getByTestId('year-result').locator('dl dd span').first().innerText();
	expect(loss).toMatch(/^\d+\.\d+\s%$/);

	// Sensors: the common mount is taken.
	await step(page, 'Sensors').click();
	await page.getByRole('button', { name: 'Find the mounts' }).click();
	await expect(page.getByTestId('mount-result')).toBeVisible({ timeout: 120_000 });
	await page.getByRole('button', { name: 'Use this mount for the field' }).click();
	await expect(page.getByTestId('saved-choice')).toContainText('Chosen for the field');
	await saved(page);

	// Plan: issued, downloaded, read with other people's tools.
	await step(page, 'Plan').click();
	await expect(page.getByTestId('draft-sheet')).toContainText('DRAFT — not for construction');
	await page.getByRole('button', { name: 'Issue plan' }).click();
	const dialog = page.getByRole('dialog');
	await dialog.getByLabel(/^Reason/).fill('First issue for pegging out');
	await dialog.getByRole('button', { name: 'Issue revision A' }).click();
	const issued = page.getByTestId('issued-plans');
	await expect(issued).toContainText('First issue for pegging out');

	const download = async (link: RegExp, name: string) => {
		const [file] = await Promise.all([
			page.waitForEvent('download'),
			issued.getByRole('link', { name: link }).click()
		]);
		const path = info.outputPath(name);
		await file.saveAs(path);
		return path;
	};
	const pdf = await download(/Plan sheets/, 'plan.pdf');
	const text = execFileSync('pdftotext', ['-layout', pdf, '-'], { encoding: 'utf8' });
	expect(text).toContain('Prà Lungo');
	expect(text).toContain('Nives Aldobran');
	expect(text).toMatch(/SCALE 1:(100|200|500|1000)\b/);
	expect(text).toContain('seen facing the glass');
	expect(text).not.toContain('DRAFT');

	// Every tracker of the peg list stands in the PDF's coordinate table with the same east and north.
	const rows = (await readFile(await download(/Peg list/, 'pegs.csv'), 'utf8')).trim().split('\r\n');
	const heads = rows[0].replace('\uFEFF', '').split(',');
	const column = (name: RegExp) => heads.findIndex((head) => name.test(head));
	const [tag, east, north] = [column(/^tag$/), column(/^e_m$/), column(/^n_m$/)];
	expect(rows).toHaveLength(count + 1);
	for (const row of rows.slice(1)) {
		const cells = row.split(',');
		const line = new RegExp(`\\b${cells[tag]}\\s+${cells[east]}\\s+${cells[north]}\\b`);
		expect(text.replaceAll('−', '-')).toMatch(line);
	}
	const map = JSON.parse(await readFile(await download(/Field map/, 'field.geojson'), 'utf8'));
	const points = map.features.filter((one: { geometry: { type: string } }) => one.geometry.type === 'Point');
	expect(points.length).toBeGreaterThanOrEqual(count);

	await step(page, 'Site').click();
	await expect(page.getByRole('heading', { name: 'Build from revision A' })).toBeVisible();
});
