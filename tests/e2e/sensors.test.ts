import AxeBuilder from '@axe-core/playwright';
import { expect, test } from '@playwright/test';
import { signIn } from './helpers/sign-in';
import { makeSmallField, storedLayout } from './helpers/small-field';

test.describe('the sensors page', () => {
	test('finds the mounts, explains a place, and saves the choice with the layout', async ({ page }) => {
		await signIn(page, 'designer@tiltyard.test');
		const { projectId, layoutId } = await makeSmallField(page);
		await page.goto(`/projects/${projectId}/sensors`);
		await page.getByRole('button', { name: 'Find the mounts' }).click();
		await expect(page.getByTestId('mount-result')).toBeVisible({ timeout: 90_000 });
		await expect(page.getByTestId('mount-headline')).toHaveText(/^(One mount serves|No one mount serves)/);
		await expect(page.getByText(/costs little energy/)).toBeVisible();
		await expect(page.getByText(/any place on the top edge would be as good/)).toBeVisible();

		const bottom = page.getByRole('slider', { name: /^bottom edge of / });
		await bottom.focus();
		await page.keyboard.press('Home');
		await expect(page.getByTestId('chosen-place')).toContainText('Bottom edge');
		const before = await bottom.getAttribute('aria-valuetext');
		await page.keyboard.press('ArrowRight');
		await expect(bottom).not.toHaveAttribute('aria-valuetext', before ?? '');
		await expect(page.getByRole('heading', { name: /^Why it is (Clear|Sound|Watch|Unfit)/ })).toBeVisible();
		expect((await new AxeBuilder({ page }).analyze()).violations).toEqual([]);

		await expect(
			page.getByRole('button', { name: 'Use the place you look at for the whole field' })
		).toBeEnabled();
		await page.getByRole('button', { name: 'Use this mount for the field' }).click();
		await expect(page.getByTestId('saved-choice')).toContainText('Chosen for the field');
		await expect.poll(async () => (await storedLayout(page, layoutId)).mounts.common !== null).toBe(true);
		const stored = (await storedLayout(page, layoutId)).mounts;
		expect(stored.fromRunId).not.toBeNull();

		await page.getByRole('button', { name: /^Use here only/ }).click();
		await expect
			.poll(async () =>
				Object.values((await storedLayout(page, layoutId)).mounts.exceptions).some(
					(mount) => mount.edge === 'bottom'
				)
			)
			.toBe(true);

		await page.reload();
		await expect(page.getByTestId('saved-choice')).toContainText('Chosen for the field');
		await expect(page.getByText('Out of date', { exact: true })).toBeHidden();
		await page.getByRole('button', { name: 'Clear the choice' }).click();
		await expect.poll(async () => (await storedLayout(page, layoutId)).mounts.common).toBeNull();
	});

	test('is not there for somebody outside the project', async ({ page, browser }) => {
		await signIn(page, 'designer@tiltyard.test');
		const { projectId } = await makeSmallField(page);
		const stranger = await browser.newPage();
		await signIn(stranger, 'crew@tiltyard.test');
		const answer = await stranger.goto(new URL(`/projects/${projectId}/sensors`, page.url()).href);
		expect(answer?.status()).toBe(404);
		await stranger.close();
	});
});
