import AxeBuilder from '@axe-core/playwright';
import { expect, test } from '@playwright/test';
import { expectHidden, expectProblem } from './helpers/refused';
import { signIn } from './helpers/sign-in';
import { demoPassword } from '../../scripts/lib/settings.mjs';

const password = 'frost on the low glass';
let count = 0;
/** An address that no other run and no retry has used. */
const freshEmail = () => `walker-${Date.now().toString(36)}-${(count += 1)}@tiltyard.test`;

test('somebody signs up, signs out, forgets the password and comes back by the letter', async ({
	page,
	browser
}) => {
	const email = freshEmail();
	await page.goto('/sign-up');
	await page.getByLabel('Your name').fill('Willa Walker');
	await page.getByLabel('Team').fill('Walker & Daughters');
	await page.getByLabel('E-mail').fill(email);
	await page.getByLabel('Password').fill('short');
	await page.getByRole('button', { name: 'Make the account' }).click();
	// Refused by the field, and nothing that was typed is lost.
	await expect(page.getByText('Use at least 10 characters')).toBeVisible();
	await expect(page.getByLabel('E-mail')).toHaveValue(email);
	await expect(page.getByLabel('Your name')).toHaveValue('Willa Walker');
	await page.getByLabel('Password').fill(password);
	await page.getByRole('button', { name: 'Make the account' }).click();
	await expect(page).toHaveURL(/\/projects/);

	// A second browser that is signed in as well; the reset must end it.
	const other = await (await browser.newContext()).newPage();
	await signIn(other, email, password);

	await page.goto('/sign-out');
	await page.getByRole('button', { name: 'Sign out' }).click();
	await expect(page).toHaveURL(/\/sign-in/);
	await page.goto('/projects');
	await expect(page).toHaveURL(/\/sign-in\?next=%2Fprojects/);

	await page.getByRole('link', { name: 'Set a new password' }).click();
	await expect(page.getByRole('heading', { name: 'Set a new password' })).toBeVisible();
	await page.getByLabel('E-mail').fill(email);
	await page.getByRole('button', { name: 'Send the link' }).click();
	await expect(page.getByText('Look into your mail')).toBeVisible();
	await expect(async () => {
		await page.goto('/mailbox');
		await expect(page.getByText(email).first()).toBeVisible({ timeout: 500 });
	}).toPass({ timeout: 10_000 });
	await page.getByRole('article').filter({ hasText: email }).getByRole('link').click();

	await page.getByLabel('New password').fill('violet shadows at noon');
	await page.getByLabel('The same once more').fill('violet shadows at night');
	await page.getByRole('button', { name: 'Set the password' }).click();
	await expect(page.getByText('The two differ')).toBeVisible();
	await page.getByLabel('New password').fill('violet shadows at noon');
	await page.getByLabel('The same once more').fill('violet shadows at noon');
	await page.getByRole('button', { name: 'Set the password' }).click();
	await expect(page.getByText('Your new password is set')).toBeVisible();
	await page.getByLabel('E-mail').fill(email);
	await page.getByLabel('Password').fill('violet shadows at noon');
	await page.getByRole('button', { name: 'Sign in' }).click();
	await expect(page).toHaveURL(/\/projects/);

	await other.goto('/projects');
	await expect(other).toHaveURL(/\/sign-in/);
	await other.context().close();
});

test('wrong passwords are limited, with a sentence that says how long to wait', async ({ page }) => {
	const email = freshEmail();
	await page.goto('/sign-in');
	for (let i = 0; i < 6; i++) {
		await page.getByLabel('E-mail').fill(email);
		await page.getByLabel('Password').fill(`guess number ${i}`);
		const answered = page.waitForResponse((response) => response.request().method() === 'POST');
		await page.getByRole('button', { name: 'Sign in' }).click();
		await answered;
		await expect(page.getByText('do not belong together')).toBeVisible();
	}
	await page.getByRole('button', { name: 'Sign in' }).click();
	await expect(page.getByText(/Too many tries to sign in\. Wait 1\d minutes/)).toBeVisible();
	await expect(page.getByLabel('E-mail')).toHaveValue(email);
	const plain = await page.request.post('/sign-in', {
		form: { email, password: 'guess' },
		headers: { accept: 'text/html', origin: new URL(page.url()).origin },
		maxRedirects: 0
	});
	expect(plain.status()).toBe(429);
	expect(Number(plain.headers()['retry-after'])).toBeGreaterThan(600);
});

test('signing in leads back to the page that was asked for, and only to this site', async ({ page }) => {
	await page.goto('/projects?sort=name');
	await expect(page).toHaveURL(/\/sign-in\?next=/);
	await page.getByLabel('E-mail').fill('designer@tiltyard.test');
	await page.getByLabel('Password').fill(demoPassword);
	await page.getByRole('button', { name: 'Sign in' }).click();
	await expect(page).toHaveURL(/\/projects\?sort=name/);
	for (const astray of ['https://example.org/', '//example.org', '/\\example.org', '/\t/example.org']) {
		const response = await page.request.get(`/sign-in?next=${encodeURIComponent(astray)}`, {
			maxRedirects: 0
		});
		expect(response.headers().location).toBe('/projects');
	}
});

test('signed-out people are sent to sign in by pages and told so by the API', async ({ request }) => {
	for (const path of ['/projects', '/projects/new', '/projects/nothing/trackers', '/sign-out']) {
		const response = await request.get(path, { maxRedirects: 0 });
		expect(response.status(), path).toBe(303);
		expect(response.headers().location).toContain('/sign-in');
	}
	await expectProblem(request, 'GET', '/api/v1/projects', 401);
	await expectProblem(request, 'GET', '/api/v1/me', 401, {
		headers: { authorization: 'Bearer tyd_invented' }
	});
	await expectProblem(request, 'POST', '/api/v1/projects', 401, { data: {} });
	await expectHidden(request, '/nowhere');
	await expectProblem(request, 'GET', '/api/v1/nowhere', 404);
});

test('a page of another site can neither post a form nor write to the API with the sign-in', async ({
	page
}) => {
	await signIn(page, 'owner@tiltyard.test');
	const foreign = { origin: 'http://elsewhere.test' };
	const form = await page.request.post('/sign-out', { form: {}, headers: foreign, maxRedirects: 0 });
	expect(form.status()).toBe(403);
	await expectProblem(page.request, 'POST', '/api/v1/tokens', 403, { data: { name: 'x' }, headers: foreign });
	await page.goto('/projects');
	await expect(page).toHaveURL(/\/projects$/);
});

test('a personal token works within its scope and ends when it is withdrawn', async ({
	page,
	playwright,
	baseURL
}) => {
	await signIn(page, 'designer@tiltyard.test');
	const made = await page.request.post('/api/v1/tokens', { data: { name: 'Reader', scopes: ['read'] } });
	expect(made.status()).toBe(201);
	const { id, token } = await made.json();
	const outside = await playwright.request.newContext({
		baseURL,
		extraHTTPHeaders: { authorization: `Bearer ${token}` }
	});
	expect(await (await outside.get('/api/v1/me')).json()).toMatchObject({ email: 'designer@tiltyard.test' });
	await expectProblem(outside, 'POST', '/api/v1/projects', 403, { data: {} });
	expect((await page.request.delete(`/api/v1/tokens/${id}`)).status()).toBe(204);
	await expectProblem(outside, 'GET', '/api/v1/me', 401);
	await outside.dispose();
});

test('an owner invites a client by letter, who joins with that address and sees only that project', async ({
	page,
	browser
}) => {
	await signIn(page, 'owner@tiltyard.test');
	const me = await (await page.request.get('/api/v1/me')).json();
	const made = await page.request.post('/api/v1/projects', {
		data: {
			name: 'Invited field',
			place: { latitudeDeg: 45.07, longitudeDeg: 7.69, altitudeM: 240, timeZone: 'Europe/Rome' }
		}
	});
	expect(made.status(), await made.text()).toBe(201);
	const project = await made.json();
	const email = freshEmail();
	const invited = await page.request.post(`/api/v1/teams/${me.teams[0].id}/invitations`, {
		data: { email, role: 'client', projectId: project.id }
	});
	expect(invited.status(), await invited.text()).toBe(201);
	await page.goto('/mailbox');
	const link = page.getByRole('article').filter({ hasText: email }).getByRole('link');
	const address = (await link.getAttribute('href'))!;

	// The owner holds the link, but it was not sent to them.
	await page.goto(address);
	await expect(page.getByText(`Sent to ${email}`)).toBeVisible();

	const guest = await (await browser.newContext()).newPage();
	await guest.goto(address);
	await guest.getByRole('link', { name: 'Make an account' }).click();
	await guest.getByLabel('Your name').fill('Gesa Guest');
	await guest.getByLabel('Team').fill('Land owner');
	await guest.getByLabel('E-mail').fill(email);
	await guest.getByLabel('Password').fill(password);
	await guest.getByRole('button', { name: 'Make the account' }).click();
	await guest.getByRole('button', { name: 'Join' }).click();
	await expect(guest).toHaveURL(new RegExp(`/projects/${project.id}`));
	const seen = await (await guest.request.get('/api/v1/projects')).json();
	expect(seen.items.map((item: { id: string }) => item.id)).toEqual([project.id]);
	await expectProblem(guest.request, 'PATCH', `/api/v1/projects/${project.id}`, 403, {
		data: { name: 'Mine' }
	});
	await guest.goto(address);
	await expect(guest.getByText('accepted already')).toBeVisible();
	await guest.context().close();
	await page.request.delete(`/api/v1/projects/${project.id}`);
});

test('every page carries the security headers, and errors a reference number', async ({ page, request }) => {
	const broken: string[] = [];
	page.on('console', (message) => {
		if (/Content Security Policy/i.test(message.text())) broken.push(message.text());
	});
	const response = (await page.goto('/sign-in'))!;
	const headers = response.headers();
	expect(headers['content-security-policy']).toMatch(/script-src 'self' 'nonce-[^']+'/);
	expect(headers['content-security-policy']).toContain("frame-ancestors 'none'");
	expect(headers['content-security-policy']).not.toContain('unsafe-eval');
	expect(headers).toMatchObject({
		'x-content-type-options': 'nosniff',
		'x-frame-options': 'DENY',
		'referrer-policy': 'same-origin'
	});
	expect(headers['permissions-policy']).toContain('microphone=()');
	expect(headers['strict-transport-security']).toBeUndefined();
	expect(broken).toEqual([]);

	const missing = (await page.goto('/nowhere-at-all'))!;
	expect(missing.status()).toBe(404);
	const reference = missing.headers()['x-request-id'];
	expect(reference).toMatch(/^[A-Z0-9]{4}-[A-Z0-9]{4}$/);
	await expect(page.getByText(reference)).toBeVisible();

	const large = await request.post('/api/v1/compute/sun', {
		data: ' '.repeat(17 * 1024 * 1024),
		headers: { 'content-type': 'application/json' }
	});
	expect(large.status()).toBe(413);
	expect((await large.json()).detail).toContain('at most 16 MB');
});

for (const [path, scheme] of [
	['/sign-in', 'light'],
	['/sign-up', 'dark'],
	['/forgot', 'light'],
	['/mailbox', 'dark'],
	['/nowhere', 'light']
] as const) {
	test(`${path} has no barrier that axe can find (${scheme})`, async ({ page }) => {
		await page.emulateMedia({ colorScheme: scheme });
		await page.goto(path);
		const { violations } = await new AxeBuilder({ page }).analyze();
		expect(violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html).join(' ')}`)).toEqual(
			[]
		);
	});
}

test('signing in works by keyboard alone, on a phone, and without JavaScript', async ({
	browser,
	baseURL
}) => {
	const context = await browser.newContext({
		baseURL,
		viewport: { width: 360, height: 740 },
		javaScriptEnabled: false
	});
	const page = await context.newPage();
	await page.goto('/sign-in');
	await page.getByLabel('E-mail').focus();
	await page.keyboard.type('crew@tiltyard.test');
	await page.keyboard.press('Tab');
	await page.keyboard.type(demoPassword);
	await page.keyboard.press('Tab');
	await expect(page.getByRole('button', { name: 'Sign in' })).toBeFocused();
	await page.keyboard.press('Enter');
	await expect(page).toHaveURL(/\/projects/);
	await context.close();
});
