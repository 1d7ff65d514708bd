import AxeBuilder from '@axe-core/playwright';
import { expect, test } from '@playwright/test';
import { signIn } from './helpers/sign-in';
import { makeSmallField, moveFirstTracker } from './helpers/small-field';

test.describe('the shade page', () => {
	test('answers the shortest day at once, in words and row by row', async ({ page }) => {
		await signIn(page, 'designer@tiltyard.test');
		const { projectId } = await makeSmallField(page);
		await page.goto(`/projects/${projectId}/shade`);
		await expect(page.getByTestId('verdict')).toContainText(/^(Met|Not met): /);
		const strip = page.getByRole('slider', { name: /^Shade strip of 21 December/ });
		await strip.focus();
		const first = (await strip.getAttribute('aria-valuetext')) ?? '';
		await page.keyboard.press('ArrowRight');
		await expect(strip).not.toHaveAttribute('aria-valuetext', first);
		await expect(strip).toHaveAttribute('aria-valuetext', /^A01 at \d\d:\d\d: \d+\u00a0% shaded, sun /);
		await page.keyboard.press('ArrowDown');
		await expect(strip).toHaveAttribute('aria-valuetext', /^A02 at /);
		await page.keyboard.press('Enter');
		await expect(page.getByText(/^A02(: .* shaded, | is in full sun)/)).toBeVisible();
		await page.getByRole('button', { name: 'As a table: Every tracker through the day' }).click();
		await expect(page.getByRole('table', { name: /Shade of each tracker on 21 December/ })).toContainText(
			'B03'
		);
	});

	test('computes the year, keeps it over a reload, and says when it is out of date', async ({ page }) => {
		await signIn(page, 'designer@tiltyard.test');
		const { projectId, layoutId } = await makeSmallField(page);
		await page.goto(`/projects/${projectId}/shade`);
		await page.getByRole('button', { name: 'Compute the year' }).click();
		const result = page.getByTestId('year-result');
		await expect(result).toBeVisible({ timeout: 60_000 });
		await expect(result.getByText('beam lost to shade', { exact: true }).first()).toBeVisible();
		const figure = await result.locator('dl dd span').first().innerText();
		expect(Number(figure.replace(/[^\d.]/g, ''))).toBeGreaterThan(0);
		await expect(result.getByText('input hash')).toBeVisible();
		await expect(result.getByText(/Not modelled here: the electrical loss/)).toBeVisible();

		const table = result.getByRole('table', { name: /Shade of each tracker over the year/ });
		await table.getByRole('button', { name: /^Beam lost/ }).click();
		const losses = (await table.locator('tbody tr td:nth-child(2)').allInnerTexts()).map(Number);
		expect(losses).toHaveLength(6);
		expect(losses).toEqual([...losses].sort((a, b) => a - b));
		const download = page.waitForEvent('download');
		await result.getByRole('button', { name: 'Download CSV' }).last().click();
		expect((await download).suggestedFilename()).toMatch(/^shade-\d{4}-by-tracker\.csv$/);

		await page.reload();
		await expect(page.getByTestId('year-result')).toBeVisible();
		await expect(page.getByTestId('year-result').locator('dl dd span').first()).toHaveText(figure);
		expect((await new AxeBuilder({ page }).analyze()).violations).toEqual([]);

		await moveFirstTracker(page, layoutId);
		await page.reload();
		await expect(page.getByText('Out of date', { exact: true })).toBeVisible();
		await page.getByRole('button', { name: 'Compute again' }).click();
		await expect(page.getByText('Out of date', { exact: true })).toBeHidden({ timeout: 60_000 });
		await expect(page.getByTestId('year-result')).toBeVisible();
	});

	test('follows a run over a reload and cancels it', async ({ page }) => {
		await signIn(page, 'designer@tiltyard.test');
		const { projectId } = await makeSmallField(page, { rows: 8, columns: 150 });
		await page.goto(`/projects/${projectId}/shade`);
		await page.getByLabel('Time step').selectOption('5');
		// With its energy the year takes long enough to be met again and stopped.
		await page.getByLabel('Energy of the year').selectOption('clear');
		await page.getByRole('button', { name: 'Compute the year' }).click();
		await expect(page.getByRole('progressbar')).toBeVisible();
		await page.reload();
		await expect(page.getByRole('progressbar')).toBeVisible();
		await page.getByRole('button', { name: 'Cancel the run' }).click();
		await expect(page.getByText('The run was cancelled.')).toBeVisible({ timeout: 20_000 });
		await expect(page.getByRole('button', { name: 'Compute the year' })).toBeEnabled();
		await expect(page.getByTestId('year-result')).toBeHidden();
	});

	test('starts no run while a field is refused, keeps what was typed and says why', async ({ page }) => {
		await signIn(page, 'designer@tiltyard.test');
		const { projectId } = await makeSmallField(page);
		await page.goto(`/projects/${projectId}/shade`);
		const year = page.getByRole('textbox', { name: 'Year' });
		await expect(page.getByTestId('verdict')).toBeVisible();
		let asked = 0;
		page.on('request', (request) => {
			if (request.method() === 'POST' && request.url().endsWith('/runs')) asked += 1;
		});
		await year.fill('3000');
		await year.press('Enter');
		await expect(year).toHaveValue('3000');
		await expect(year).toHaveAttribute('aria-invalid', 'true');
		await page.getByRole('button', { name: 'Compute the year' }).click();
		await expect(page.getByText('Nothing was started')).toBeVisible();
		await expect(year).toBeFocused();
		await page.getByRole('button', { name: 'Compute the whole year' }).click();
		await expect(year).toBeFocused();
		expect(asked).toBe(0);

		// Mended, the button beside the verdict starts it.
		await year.fill('2027');
		await year.press('Enter');
		await expect(page.getByText('Nothing was started')).toBeHidden();
		await page.getByRole('button', { name: 'Compute the whole year' }).click();
		await expect(page.getByTestId('year-result')).toBeVisible({ timeout: 60_000 });
		expect(asked).toBe(1);
		await expect(page.getByRole('button', { name: 'Compute the whole year' })).toBeHidden();

		// The sensors are asked for the same year unless told otherwise.
		await page.goto(`/projects/${projectId}/sensors`);
		await expect(page.getByRole('textbox', { name: 'Year' })).toHaveValue('2027');
	});

	test('adds the energy under a clear sky: losses apart, with their range and their reasons', async ({
		page
	}) => {
		await signIn(page, 'designer@tiltyard.test');
		const { projectId } = await makeSmallField(page);
		await page.goto(`/projects/${projectId}/shade`);
		await page.getByLabel('Energy of the year').selectOption('clear');
		await expect(page.getByRole('textbox', { name: 'Albedo' })).toHaveValue('0.2');
		await page.getByRole('button', { name: 'Compute the year' }).click();
		const energy = page.getByTestId('energy-result');
		await expect(energy).toBeVisible({ timeout: 90_000 });
		await expect(energy.getByText(/^likely\. Wiring alone: \d+\.\d.% to \d+\.\d.%\. Not in that range/)).toBeVisible(); // prettier-ignore
		for (const part of ['beam shaded', 'sky covered', 'strings']) {
			const words = await energy.getByText(new RegExp(`^\\d+\\.\\d+.% ${part}$`)).innerText();
			expect(parseFloat(words), part).toBeGreaterThan(0);
		}
		await energy.getByRole('button', { name: 'As a table: What is lost, and to what' }).click();
		await expect(energy.getByRole('table', { name: /^Losses apart, tracker by tracker/ })).toContainText(
			'B03'
		);
		expect((await new AxeBuilder({ page }).analyze()).violations).toEqual([]);
		await page.reload();
		await expect(page.getByTestId('energy-result')).toBeVisible();
	});

	test('finds who takes whose light, by the keyboard, and tells one tracker apart', async ({ page }) => {
		await signIn(page, 'designer@tiltyard.test');
		const { projectId } = await makeSmallField(page);
		await page.goto(`/projects/${projectId}/shade`);
		const find = page.getByRole('button', { name: 'Find who takes whose light' });
		await find.focus();
		await page.keyboard.press('Enter');
		const found = page.getByTestId('answers-result');
		await expect(found).toBeVisible({ timeout: 90_000 });
		await expect(found.getByText(/^takes \d+\.\d+.% of its year's beam$/)).toBeVisible();
		const asTable = found.getByRole('button', { name: 'As a table: Who takes whose light' });
		await asTable.focus();
		await page.keyboard.press('Enter');
		const pairs = found.getByRole('table', { name: "The field's strongest pairs" });
		expect(await pairs.locator('tbody tr').count()).toBeGreaterThan(3);
		const trackers = found.getByRole('table', { name: /^Who takes light from each tracker/ });
		await expect(trackers.locator('tbody tr')).toHaveCount(6);
		await trackers.getByRole('button', { name: 'B02' }).focus();
		await page.keyboard.press('Enter');
		await expect(found.getByRole('list', { name: 'Who takes light from B02, most first' })).toBeVisible();
		expect((await new AxeBuilder({ page }).analyze()).violations).toEqual([]);
	});
});
