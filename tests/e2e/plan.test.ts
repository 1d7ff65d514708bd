import { createHash } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import { execFileSync } from 'node:child_process';
import AxeBuilder from '@axe-core/playwright';
import { expect, test } from '@playwright/test';
import { signIn } from './helpers/sign-in';
import { makeSmallField } from './helpers/small-field';

test.describe('the plan page', () => {
	test('shows the draft and its open points, asks for a reason, issues, and hands out the files', async ({
		page
	}, info) => {
		await signIn(page, 'designer@tiltyard.test');
		const { projectId } = await makeSmallField(page);
		await page.goto(`/projects/${projectId}/plan`);
		const sheet = page.getByTestId('draft-sheet');
		await expect(sheet).toContainText('DRAFT — not for construction');
		await expect(page.getByTestId('open-points')).toContainText('No shade run was made for this layout.');
		await sheet.focus();
		await page.keyboard.press('ArrowRight');
		await expect(sheet).toContainText('Coordinate table');

		await page.getByRole('button', { name: 'Issue plan' }).click();
		const dialog = page.getByRole('dialog');
		await dialog.getByRole('button', { name: 'Issue revision A' }).click();
		await expect(dialog).toContainText('Give the reason in a few words');
		await dialog.getByLabel('Reason to issue with open points').fill('Pegging starts before the shade run');
		await dialog.getByRole('button', { name: 'Issue revision A' }).click();
		const issued = page.getByTestId('issued-plans');
		await expect(issued).toContainText('Pegging starts before the shade run');
		await expect(dialog).toBeHidden();

		const [download] = await Promise.all([
			page.waitForEvent('download'),
			issued.getByRole('link', { name: /Plan sheets/ }).click()
		]);
		const file = info.outputPath('plan.pdf');
		await download.saveAs(file);
		const text = execFileSync('pdftotext', ['-layout', file, '-'], { encoding: 'utf8' });
		expect(text).toContain('Pegging starts before the shade run');
		expect(text).toContain('SCALE 1:');
		expect(text).not.toContain('not for construction');
		const hash = createHash('sha256')
			.update(await readFile(file))
			.digest('hex');
		await expect(issued).toContainText(hash.slice(0, 10));

		const found = await new AxeBuilder({ page }).exclude('[data-testid="draft-sheet"]').analyze();
		expect(found.violations).toEqual([]);
	});

	test('is told to strangers as nothing', async ({ page }) => {
		await signIn(page, 'designer@tiltyard.test');
		const { projectId, layoutId } = await makeSmallField(page);
		await page.context().clearCookies();
		await page.goto(`/projects/${projectId}/plan`);
		await expect(page).toHaveURL(/\/sign-in/);
		await signIn(page, 'crew@tiltyard.test');
		for (const path of ['plan', 'site', `plan/sheet.svg?layout=${layoutId}&number=1`]) {
			const response = await page.request.get(`/projects/${projectId}/${path}`);
			expect([path, response.status()]).toEqual([path, 404]);
		}
	});
});

test.describe('the site page', () => {
	test('on a phone gives each tracker of the valid plan its card', async ({ page }) => {
		await signIn(page, 'designer@tiltyard.test');
		const { projectId, layoutId } = await makeSmallField(page);
		await page.setViewportSize({ width: 360, height: 740 });
		await page.goto(`/projects/${projectId}/site`);
		await expect(page.getByText('No plan is issued yet')).toBeVisible();
		const origin = new URL(page.url()).origin;
		const issued = await page.request.post(`/api/v1/projects/${projectId}/plans`, {
			headers: { origin },
			data: { layoutId, reason: 'For the crew' }
		});
		expect(issued.status()).toBe(201);
		await page.reload();
		await expect(page.getByRole('heading', { name: 'Build from revision A' })).toBeVisible();
		await page.getByLabel('Find a tracker').fill('a02');
		await page.getByRole('button', { name: /^A02/ }).click();
		const card = page.getByTestId('tracker-card');
		await expect(card).toContainText('Axis above ground');
		await expect(card).toContainText('It moves by itself');
		expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(360);
		const found = await new AxeBuilder({ page }).analyze();
		expect(found.violations).toEqual([]);
	});
});
