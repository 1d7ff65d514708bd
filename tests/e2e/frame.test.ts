import AxeBuilder from '@axe-core/playwright';
import { expect, test, type Page } from '@playwright/test';
import { signIn } from './helpers/sign-in';

const password = 'low sun over the furrows';
let count = 0;

/** A new person with a team of their own, signed in. */
async function newPerson(page: Page, name = 'Frida Frost'): Promise<string> {
	const email = `frame-${Date.now().toString(36)}-${(count += 1)}@tiltyard.test`;
	await page.goto('/sign-up');
	await page.getByLabel('Your name').fill(name);
	await page.getByLabel('Team').fill('Frost & Furrow');
	await page.getByLabel('E-mail').fill(email);
	await page.getByLabel('Password').fill(password);
	await page.getByRole('button', { name: 'Make the account' }).click();
	await expect(page).toHaveURL(/\/projects$/);
	return email;
}

/** Opens a project over the API; answers its id. */
async function newProject(page: Page, name: string): Promise<string> {
	const response = await page.request.post('/api/v1/projects', {
		headers: { origin: new URL(page.url()).origin },
		data: { name, place: { latitudeDeg: 41.2, longitudeDeg: 14.5 } }
	});
	expect(response.status(), await response.text()).toBe(201);
	return ((await response.json()) as { id: string }).id;
}

async function expectNoBarriers(page: Page) {
	const { violations } = await new AxeBuilder({ page }).analyze();
	expect(violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html).join(' ')}`)).toEqual([]);
}

test('a new person opens a project at a place that was pasted', async ({ page }) => {
	await newPerson(page);
	await expect(page.getByRole('heading', { name: 'Start with a piece of land' })).toBeVisible();
	await page.getByRole('link', { name: 'New project' }).click();
	await expect(page.getByRole('heading', { name: 'New project' })).toBeVisible();

	await page.getByLabel('Name of the project').fill('Upper meadow');
	await page.getByLabel('Place').fill('141.2, 14.5');
	await page.getByLabel('Altitude').fill('300 + 12');
	await page.getByRole('button', { name: 'Open project' }).click();
	await expect(page.getByText('Latitude comes first').first()).toBeVisible();
	await expect(page.getByLabel('Name of the project')).toHaveValue('Upper meadow');
	await expect(page.getByLabel('Altitude')).toHaveValue('312');

	await page.getByLabel('Place').fill('41°12′00″ N 14°30′00″ E');
	await expect(page.getByText('41.2000° N, 14.5000° E')).toBeVisible();
	// Noon on the shortest day: 90 - 41.2 - 23.44 degrees, and 0.03 of refraction.
	await expect(page.getByText(/Shortest day: 25\.4° at noon/)).toBeVisible();
	await expect(page.getByLabel('Time zone')).toHaveValue('Europe/Rome');
	await page.getByRole('button', { name: 'Open project' }).click();
	await expect(page).toHaveURL(/\/projects\/[^/]+\/plot/);

	const trail = page.getByRole('navigation', { name: 'Trail' });
	await expect(trail.getByRole('link')).toHaveText([/Plot/, /Trackers/, /Shade/, /Sensors/, /Plan/, /Site/]);
	await expect(trail.getByRole('link', { name: /Plot/ })).toHaveAttribute('aria-current', 'step');
	await page.goto('/projects');
	await expect(page.getByRole('article').getByRole('link', { name: 'Upper meadow' })).toBeVisible();
});

test('settings change the facts, copy and rename a layout, and delete the project by its name', async ({
	page
}) => {
	await newPerson(page);
	const id = await newProject(page, 'Settings meadow');
	await page.goto(`/projects/${id}/settings`);
	await page.getByLabel('Name of the project').fill('Lower meadow');
	await page.getByLabel('Sun height').fill('10,5');
	await page.getByRole('button', { name: 'Save settings' }).click();
	await expect(page.getByText('Project settings saved')).toBeVisible();
	await expect(page.getByRole('banner').getByText('Lower meadow')).toBeVisible();
	const stored = await (await page.request.get(`/api/v1/projects/${id}`)).json();
	expect(stored).toMatchObject({
		name: 'Lower meadow',
		winterRule: { kind: 'clear-above', elevationDeg: 10.5 }
	});

	await page.getByRole('button', { name: 'Copy Layout 1' }).click();
	await expect(page.getByRole('button', { name: 'Rename Layout 1 copy' })).toBeVisible();
	await page.getByRole('button', { name: 'Rename Layout 1 copy' }).click();
	await page.getByLabel('Name of the layout').fill('Wide pitch');
	await page.getByRole('button', { name: 'Rename layout', exact: true }).click();
	await expect(page.getByRole('link', { name: 'Wide pitch' })).toBeVisible();
	await page.getByRole('button', { name: 'Delete Layout 1' }).click();
	await page.getByRole('button', { name: 'Delete layout', exact: true }).click();
	await expect(page.getByRole('button', { name: 'Rename Layout 1' })).toHaveCount(0);

	await page.getByLabel(/To delete it, write its name/).fill('Upper meadow');
	await page.getByRole('button', { name: 'Delete project' }).click();
	await expect(page.getByText('Write the name exactly: Lower meadow')).toBeVisible();
	await page.getByLabel(/To delete it, write its name/).fill('Lower meadow');
	await page.getByRole('button', { name: 'Delete project' }).click();
	await expect(page).toHaveURL(/\/projects$/);
	expect((await page.request.get(`/api/v1/projects/${id}`)).status()).toBe(404);
});

test('a stranger finds neither the project nor its settings', async ({ page, browser }) => {
	await newPerson(page);
	const id = await newProject(page, 'Walled garden');
	const other = await (await browser.newContext()).newPage();
	await newPerson(other, 'Sten Stranger');
	for (const path of [`/projects/${id}`, `/projects/${id}/settings`]) {
		const answer = await other.goto(path);
		expect(answer?.status()).toBe(404);
		expect(await other.content()).not.toContain('Walled garden');
	}
	const posted = await other.request.post(`/projects/${id}/settings?/deleteProject`, {
		form: { typedName: 'Walled garden' },
		headers: { origin: new URL(other.url()).origin, accept: 'text/html' }
	});
	expect(posted.status()).toBe(404);
	expect((await page.request.get(`/api/v1/projects/${id}`)).status()).toBe(200);
	await other.context().close();
});

test('the account keeps a name, a theme, a password and tokens', async ({ page }) => {
	const email = await newPerson(page);
	await page.goto('/account');
	await page.getByLabel('Your name').fill('Frida Furrow');
	await page.getByRole('button', { name: 'Save name' }).click();
	await expect(page.getByRole('button', { name: 'Account of Frida Furrow' })).toBeVisible();

	await page.getByRole('button', { name: 'Dark' }).click();
	await expect(page.locator('html')).toHaveAttribute('data-theme', 'dark');
	await page.reload();
	await expect(page.locator('html')).toHaveAttribute('data-theme', 'dark');

	await page.getByLabel('Name of the token').fill('Weather mast');
	await page.getByRole('button', { name: 'Make token' }).click();
	const token = await page.locator('code', { hasText: 'tyd_' }).innerText();
	const withToken = { headers: { authorization: `Bearer ${token}` } };
	expect((await page.request.get('/api/v1/me', withToken)).status()).toBe(200);
	await page.reload();
	await expect(page.getByText(token)).toHaveCount(0);
	await page.getByRole('button', { name: 'Withdraw Weather mast' }).click();
	await expect(page.getByText('Weather mast withdrawn')).toBeVisible();
	expect((await page.request.get('/api/v1/me', withToken)).status()).toBe(401);

	await page.getByLabel('Present password').fill('not this one');
	await page.getByLabel('New password', { exact: true }).fill('a colder morning');
	await page.getByLabel('New password again').fill('a colder morning');
	await page.getByRole('button', { name: 'Change password' }).click();
	await expect(page.getByText('This is not your present password')).toBeVisible();
	await page.getByLabel('Present password').fill(password);
	await page.getByRole('button', { name: 'Change password' }).click();
	await expect(page.getByText('Password changed')).toBeVisible();
	await page.goto('/sign-out');
	await page.getByRole('button', { name: 'Sign out' }).click();
	await signIn(page, email, 'a colder morning');
});

test('an owner invites a crew member, who joins by the letter and sees only that project', async ({
	page,
	browser
}) => {
	await newPerson(page);
	await newProject(page, 'Meadow for the crew');
	await newProject(page, 'Meadow kept back');
	const other = await (await browser.newContext()).newPage();
	const email = await newPerson(other, 'Carl Crew');

	await page.goto('/team');
	await page.getByLabel('E-mail').fill(email);
	await page.getByLabel('Into').selectOption({ label: 'Meadow for the crew' });
	await page.getByLabel('As', { exact: true }).selectOption('crew');
	await page.getByRole('button', { name: 'Send invitation' }).click();
	await expect(page.getByText(`Invitation sent to ${email}`)).toBeVisible();

	await expect(async () => {
		await other.goto('/mailbox');
		await expect(other.getByRole('article').filter({ hasText: email }).first()).toBeVisible({ timeout: 500 });
	}).toPass({ timeout: 10_000 });
	await other.getByRole('article').filter({ hasText: email }).getByRole('link').first().click();
	await expect(other.getByRole('heading', { name: 'Join Meadow for the crew' })).toBeVisible();
	await other.getByRole('button', { name: 'Join as crew' }).click();
	await expect(other).toHaveURL(/\/projects\/[^/]+\/site/);
	await other.goto('/projects');
	await expect(other.getByText('Meadow for the crew')).toBeVisible();
	await expect(other.getByText('Meadow kept back')).toHaveCount(0);
	await other.context().close();
});

test('a team describes a tracker model of its own', async ({ page }) => {
	await newPerson(page);
	await page.goto('/team');
	await page.getByRole('link', { name: 'Copy as your own' }).first().click();
	await page.getByLabel('Name of the model').fill('Barn-built 16');
	await page.getByLabel('Width of the glass').fill('4,2');
	await page.getByLabel('Smallest tilt').fill('85');
	await page.getByRole('button', { name: 'Save model' }).click();
	await expect(page.getByText('The largest tilt must be above the smallest tilt.').first()).toBeVisible();
	await expect(page.getByLabel('Width of the glass')).toHaveValue('4.2');
	await page.getByLabel('Smallest tilt').fill('5');
	await page.getByRole('button', { name: 'Save model' }).click();
	await expect(page.getByRole('heading', { name: 'Barn-built 16' })).toBeVisible();
	await page.getByRole('button', { name: 'Delete Barn-built 16' }).click();
	await page.getByRole('button', { name: 'Delete model' }).click();
	await expect(page.getByRole('heading', { name: 'Barn-built 16' })).toHaveCount(0);
});

test('the day band goes by keyboard and by chip', async ({ page }) => {
	await page.goto('/');
	const sun = page.getByRole('slider', { name: 'Time of day' });
	await expect(sun).toHaveAttribute('aria-valuetext', /21 December \d{4}, 08:40 site time, UTC\+1/);
	await expect(async () => {
		await sun.focus();
		await page.getByRole('button', { name: 'shortest' }).click();
		await sun.press('ArrowRight');
		await expect(sun).toHaveAttribute('aria-valuetext', /08:(45|50|55) site time/, { timeout: 500 });
	}).toPass();
	const before = (await sun.getAttribute('aria-valuetext')) ?? '';
	await sun.press('ArrowUp');
	await expect(sun).toHaveAttribute('aria-valuetext', /22 December/);
	await sun.press('ArrowDown');
	await expect(sun).toHaveAttribute('aria-valuetext', before);
	await page.getByRole('button', { name: 'longest' }).click();
	await expect(sun).toHaveAttribute('aria-valuetext', /21 June \d{4}.*UTC\+2/);
	await page.getByRole('button', { name: 'solar time' }).click();
	await expect(sun).toHaveAttribute('aria-valuetext', /solar time/);
});

for (const colorScheme of ['light', 'dark'] as const) {
	test(`first page, list, new project, settings, team and account have no barrier that axe can find (${colorScheme})`, async ({
		page
	}) => {
		await page.emulateMedia({ colorScheme });
		await page.goto('/');
		await expectNoBarriers(page);
		await newPerson(page);
		const id = await newProject(page, 'Open meadow');
		for (const path of [
			'/projects',
			'/projects/new',
			`/projects/${id}/settings`,
			'/team',
			'/team/models/new',
			'/account'
		]) {
			await page.goto(path);
			await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
			await expectNoBarriers(page);
		}
	});
}
