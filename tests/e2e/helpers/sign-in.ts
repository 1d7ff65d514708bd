import { expect, type Page } from '@playwright/test';
import { demoPassword } from '../../../scripts/lib/settings.mjs';

/** Signs in on the page as a person would; by default with the demo's password. Ends at the projects. */
export async function signIn(page: Page, email: string, password: string = demoPassword): Promise<void> {
	await page.goto('/sign-in');
	await page.getByLabel('E-mail').fill(email);
	await page.getByLabel('Password').fill(password);
	await page.getByRole('button', { name: 'Sign in' }).click();
	await expect(page).toHaveURL(/\/projects/);
}
