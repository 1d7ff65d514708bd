import AxeBuilder from '@axe-core/playwright';
import { expect, test } from '@playwright/test';
import { signIn } from './helpers/sign-in';

test('method and checks: from the account menu, measured in this build, found by an author, printed clean', async ({
	page
}) => {
	await signIn(page, 'designer@tiltyard.test');
	await page.getByRole('button', { name: /^Account of/ }).click();
	await page.getByRole('menuitem', { name: 'Method and checks' }).click();
	await expect(page.getByRole('heading', { level: 1, name: 'Method and checks' })).toBeVisible();

	// Measured while this very build was made, and nothing outside its tolerance.
	await expect(page.getByText(/core, measured \d+ \w+ \d{4}, \d\d:\d\d UTC/)).toBeVisible();
	await expect(page.getByText('within tolerance', { exact: true })).toBeVisible();
	await expect(page.getByText('Outside its tolerance')).toHaveCount(0);
	const effects = page.getByRole('article');
	expect(await effects.count()).toBeGreaterThan(14);
	const shade = page.getByRole('article', { name: 'Exact shade' });
	await expect(shade.getByText(/allowed 10⁻⁹/).first()).toBeVisible();
	// Cutting, uniting and the rectangles of alike tables, each against the same library.
	await expect(shade.getByRole('listitem').filter({ hasText: 'polyclip-ts' })).toHaveCount(3);

	// Contents lead to a section.
	await page
		.getByRole('navigation', { name: 'Contents' })
		.getByRole('link', { name: /^Weather files/ })
		.click();
	await expect(page.getByRole('heading', { name: 'Weather files' })).toBeInViewport();

	const find = page.getByRole('searchbox', { name: 'Find' });
	await find.fill('saemundsson');
	await expect(effects).toHaveCount(1);
	await expect(page.getByRole('heading', { name: 'Refraction' })).toBeVisible();
	await expect(page.getByRole('status').filter({ hasText: / of \d+ checks/ })).toBeVisible();
	await find.fill('phlogiston');
	await expect(page.getByText('Nothing holds these words')).toBeVisible();
	await find.fill('');
	await expect(page.getByRole('heading', { name: 'What is not modelled' })).toBeVisible();

	await page.emulateMedia({ media: 'print' });
	await expect(find).toBeHidden();
	await expect(shade).toBeVisible();
});

test('method and checks: light and wide, dark and at 360 pixels, without a fault for assistive technology', async ({
	page
}) => {
	await signIn(page, 'crew@tiltyard.test');
	// The page is long: a look at all of it takes its time on a busy machine.
	test.setTimeout(480_000);
	for (const [colorScheme, width] of [
		['light', 1280],
		['dark', 360]
	] as const) {
		await page.setViewportSize({ width, height: 780 });
		await page.emulateMedia({ colorScheme });
		await page.goto('/method');
		await expect(page.getByRole('heading', { level: 1, name: 'Method and checks' })).toBeVisible();
		const beyond = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
		expect(beyond, `${width} px`).toBeLessThanOrEqual(0);
		const { violations } = await new AxeBuilder({ page }).analyze();
		const found = violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html).join(' ')}`);
		expect(found, `${colorScheme}, ${width} px`).toEqual([]);
	}
});

test('method and checks are refused to a stranger, who is led to sign in and back', async ({
	page,
	request
}) => {
	const response = await request.get('/method', { maxRedirects: 0 });
	expect([302, 303]).toContain(response.status());
	expect(response.headers().location).toBe('/sign-in?next=%2Fmethod');
	await page.goto('/method');
	await expect(page).toHaveURL(/\/sign-in\?next=%2Fmethod/);
	await expect(page.getByText('Exact shade')).toHaveCount(0);
});
