import { execFile } from 'node:child_process';
import { promisify } from 'node:util';
import { eq } from 'drizzle-orm';
import { describe, expect, it, vi } from 'vitest';
import { actions, can, roles } from '$lib/access';
import { countAttempt } from '$lib/server/auth/attempts';
import { requestReset } from '$lib/server/auth/request-reset';
import { closeAllSessions, sessionService } from '$lib/server/auth/session';
import { resetHolds, setPassword } from '$lib/server/auth/set-password';
import { signIn } from '$lib/server/auth/sign-in';
import { signUp } from '$lib/server/auth/sign-up';
import { createToken, listTokens, revokeToken, verifyToken } from '$lib/server/auth/tokens';
import { db } from '$lib/server/db';
import { newId } from '$lib/server/db/ids';
import { apiTokens, passwordResets, projects, sessions, signInAttempts, users } from '$lib/server/db/schema';
import { projectsWhere, requireProject, requireTeam } from '$lib/server/guard';
import { listLetters } from '$lib/server/mail/list-letters';
import { invite } from '$lib/server/teams/invite';
import { callApi, tokenOf } from './helpers/api';
import { expectRefused, joinProject, joinTeam, makePerson, testPassword } from './helpers/people';
import { useTemporaryDatabase } from './helpers/temporary-database';

useTemporaryDatabase();

const home = 'http://tiltyard.test';

async function makeProject(teamId: string): Promise<string> {
	const id = newId();
	const now = new Date();
	await db.insert(projects).values({
		id,
		teamId,
		name: 'Test field',
		notes: '',
		place: {
			latitudeDeg: 45,
			longitudeDeg: 7,
			altitudeM: 0,
			timeZone: 'Europe/Rome',
			magneticDeclinationDeg: 0
		},
		winterRule: { kind: 'clear-above', elevationDeg: 12 },
		plot: {
			version: 1,
			boundary: [],
			ground: { kind: 'level', heightM: 0 },
			skyline: [],
			obstacles: [],
			setBackM: 0
		},
		plotRevision: 1,
		createdAt: now,
		updatedAt: now
	});
	return id;
}

async function letterTo(email: string): Promise<string> {
	return vi.waitFor(
		async () => {
			const letter = (await listLetters()).find(({ to }) => to === email);
			expect(letter).toBeDefined();
			return letter!.text;
		},
		{ timeout: 5000 }
	);
}

const secretIn = (text: string): string => /\/reset\/(\S+)/.exec(text)![1];

describe('signing up', () => {
	it('makes a person, their team and an argon2id hash', async () => {
		const person = await makePerson('Ada Field');
		expect(await requireTeam(person, person.teamId, 'team.manage')).toBe('owner');
		const [row] = await db.select().from(users).where(eq(users.id, person.userId));
		expect(row.passwordHash).toMatch(/^\$argon2id\$/);
		expect(row.passwordHash).not.toContain(testPassword);
	});

	it('refuses an address that has an account, and makes no second team', async () => {
		const person = await makePerson('Twice');
		const form = { name: 'Other', teamName: 'Other', email: person.email, password: testPassword };
		const refused = await expectRefused(signUp(form, 'host-twice'), 'conflict');
		expect(refused.details.errors?.[0].path).toBe('email');
		expect(await db.select().from(users).where(eq(users.email, person.email))).toHaveLength(1);
	});
});

describe('signing in', () => {
	it('takes the right password and answers the same to a wrong one and an unknown address', async () => {
		const person = await makePerson('Signer');
		const actor = await signIn({ email: person.email, password: testPassword }, 'host-a');
		expect(actor).toEqual({ userId: person.userId });
		const wrong = await expectRefused(
			signIn({ email: person.email, password: 'wrong' }, 'host-a'),
			'invalid'
		);
		const unknown = await expectRefused(
			signIn({ email: 'nobody@tiltyard.test', password: 'wrong' }, 'host-a'),
			'invalid'
		);
		expect(unknown.message).toBe(wrong.message);
	});

	it('refuses the seventh wrong try within a quarter of an hour, even with the right password, and only there', async () => {
		const person = await makePerson('Guessed');
		const tryWith = (password: string, host: string) => signIn({ email: person.email, password }, host);
		for (let i = 0; i < 6; i++) await expectRefused(tryWith(`guess ${i}`, 'host-b'), 'invalid');
		const refused = await expectRefused(tryWith(testPassword, 'host-b'), 'too_many');
		expect(refused.details.retryAfterSeconds).toBeGreaterThan(800);
		expect(refused.details.retryAfterSeconds).toBeLessThanOrEqual(900);
		expect(await tryWith(testPassword, 'host-c')).toEqual({ userId: person.userId });

		const sixteenMinutesAgo = new Date(Date.now() - 16 * 60_000);
		await db.update(signInAttempts).set({ at: sixteenMinutesAgo });
		expect(await tryWith(testPassword, 'host-b')).toEqual({ userId: person.userId });
	});

	it('lets no more than six of twenty tries at the same moment reach the password', async () => {
		const person = await makePerson('Hammered');
		const outcomes = await Promise.all(
			Array.from({ length: 20 }, (_, i) =>
				signIn({ email: person.email, password: `guess ${i}` }, 'host-d').catch((error) => error.code)
			)
		);
		expect(outcomes.filter((code) => code === 'invalid').length).toBeLessThanOrEqual(6);
		expect(outcomes.every((code) => code === 'invalid' || code === 'too_many')).toBe(true);
	});
});

describe('signing in from one host', () => {
	it('stops a list of addresses at sixty wrong tries, whatever right ones lie between', async () => {
		const own = await makePerson('Spraying');
		await db.delete(signInAttempts);
		for (let i = 0; i < 60; i += 1) {
			await expectRefused(
				signIn({ email: `listed-${i}@example.org`, password: 'guess' }, 'host-spray'),
				'invalid'
			);
			if (i % 20 === 10) await signIn({ email: own.email, password: testPassword }, 'host-spray');
		}
		await expectRefused(
			signIn({ email: 'one-more@example.org', password: 'guess' }, 'host-spray'),
			'too_many'
		);
	}, 60_000);
});

describe('the sign-ins of the demo', () => {
	it('open nothing on a copy that shows no demo, though the database still holds them', async () => {
		const email = 'owner@tiltyard.test';
		process.env.TILTYARD_SEED_DEMO = '1';
		const { userId } = await signUp(
			{ name: 'Demo', teamName: 'Demo', email, password: testPassword },
			'host-demo'
		);
		const token = await tokenOf({ userId });
		expect(await signIn({ email, password: testPassword }, 'host-demo')).toEqual({ userId });
		expect((await callApi('GET', '/api/v1/me', { token })).status).toBe(200);
		process.env.TILTYARD_SEED_DEMO = '0';
		await expectRefused(signIn({ email, password: testPassword }, 'host-demo'), 'invalid');
		expect((await callApi('GET', '/api/v1/me', { token })).status).toBe(401);
	});
});

describe('sessions', () => {
	it('hold until they are ended', async () => {
		const person = await makePerson('Sitting');
		const session = await sessionService().createSession(person.userId, {});
		const { user } = await sessionService().validateSession(session.id);
		expect(user).toMatchObject({ id: person.userId, email: person.email });
		expect(user).not.toHaveProperty('passwordHash');
		await closeAllSessions(person.userId);
		expect((await sessionService().validateSession(session.id)).session).toBeNull();
	});

	it('end by themselves when their time is over', async () => {
		const person = await makePerson('Late');
		const session = await sessionService().createSession(person.userId, {});
		await db
			.update(sessions)
			.set({ expiresAt: new Date(Date.now() - 1000) })
			.where(eq(sessions.id, session.id));
		expect((await sessionService().validateSession(session.id)).session).toBeNull();
	});
});

describe('a forgotten password', () => {
	it('is set by the link of a letter, once, and every session ends', async () => {
		const person = await makePerson('Forgetful');
		const session = await sessionService().createSession(person.userId, {});
		await requestReset(person.email, 'host-r1', home);
		const text = await letterTo(person.email);
		expect(text).toContain(`${home}/reset/`);
		const secret = secretIn(text);
		expect(await resetHolds(secret)).toBe(true);
		const rows = await db.select().from(passwordResets).where(eq(passwordResets.userId, person.userId));
		expect(rows[0].tokenHash).not.toContain(secret);

		await setPassword(secret, 'another set of words');
		expect((await sessionService().validateSession(session.id)).session).toBeNull();
		await signIn({ email: person.email, password: 'another set of words' }, 'host-r1');
		await expectRefused(signIn({ email: person.email, password: testPassword }, 'host-r1'), 'invalid');
		await expectRefused(setPassword(secret, 'a third set of words'), 'not_found');
	});

	it('can be set by one of two who press the same link at once', async () => {
		const person = await makePerson('Raced');
		await requestReset(person.email, 'host-r2', home);
		const secret = secretIn(await letterTo(person.email));
		const outcomes = await Promise.allSettled([
			setPassword(secret, 'first set of words'),
			setPassword(secret, 'second set of words')
		]);
		expect(outcomes.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
	});

	it('is not set by a link older than an hour or by an invented one', async () => {
		const person = await makePerson('Slow');
		await requestReset(person.email, 'host-r3', home);
		const secret = secretIn(await letterTo(person.email));
		await db
			.update(passwordResets)
			.set({ expiresAt: new Date(Date.now() - 1) })
			.where(eq(passwordResets.userId, person.userId));
		expect(await resetHolds(secret)).toBe(false);
		await expectRefused(setPassword(secret, 'a new set of words'), 'not_found');
		await expectRefused(setPassword('invented', 'a new set of words'), 'not_found');
	});

	it('answers the same to an unknown address, and sends it nothing', async () => {
		await requestReset('stranger@tiltyard.test', 'host-r4', home);
		expect((await listLetters()).some(({ to }) => to === 'stranger@tiltyard.test')).toBe(false);
	});

	it('sends at most four letters an hour to an address', async () => {
		const person = await makePerson('Flooded');
		for (let i = 0; i < 4; i++) await requestReset(person.email, `host-r5-${i}`, home);
		await expectRefused(requestReset(person.email, 'host-r5-9', home), 'too_many');
	});

	it('leaves the mailbox out of sight when the copy is not local', async () => {
		process.env.TILTYARD_LOCAL = '0';
		await expectRefused(listLetters(), 'not_found');
		process.env.TILTYARD_LOCAL = '1';
	});
});

describe('invitations', () => {
	it('go to at most sixty addresses an hour from one person, whatever way they are asked for', async () => {
		const person = await makePerson('Inviting');
		const ask = (i: number) =>
			invite(person, person.teamId, { email: `guest-${i}@example.org`, role: 'designer' }, home);
		await ask(0);
		// Fifty-nine more, without their letters.
		for (let i = 1; i < 60; i += 1) await countAttempt('invite', person.userId);
		await expectRefused(ask(60), 'too_many');
	});
});

describe('roles on a project', () => {
	it('let through what the table says for every role and action, and tell strangers "not found"', async () => {
		const owner = await makePerson('Owner');
		const projectId = await makeProject(owner.teamId);
		const people = {
			owner,
			designer: await makePerson('D'),
			crew: await makePerson('C'),
			client: await makePerson('K')
		};
		await joinTeam(owner.teamId, people.designer, 'designer');
		await joinProject(projectId, people.crew, 'crew');
		await joinProject(projectId, people.client, 'client');
		const stranger = await makePerson('Stranger');
		for (const action of actions) {
			for (const role of roles) {
				const passes = requireProject(people[role], projectId, action);
				if (can(role, action)) expect(await passes).toEqual({ role, teamId: owner.teamId });
				else await expectRefused(passes, 'not_allowed');
			}
			await expectRefused(requireProject(stranger, projectId, action), 'not_found');
		}
		await expectRefused(requireProject(owner, newId(), 'project.read'), 'not_found');
	});

	it('show crew and clients only the projects they were put on', async () => {
		const owner = await makePerson('Chief');
		const crew = await makePerson('Hand');
		const [here, there] = [await makeProject(owner.teamId), await makeProject(owner.teamId)];
		// Being in the team as crew opens none of its projects.
		await joinTeam(owner.teamId, crew, 'crew');
		await joinProject(here, crew, 'crew');
		const seenBy = async (actor: { userId: string }) =>
			(await db.select({ id: projects.id }).from(projects).where(projectsWhere(actor, 'project.read'))).map(
				({ id }) => id
			);
		expect(await seenBy(crew)).toEqual([here]);
		expect((await seenBy(owner)).sort()).toEqual([here, there].sort());
		await expectRefused(requireProject(crew, there, 'project.read'), 'not_found');
		const editable = await db.select().from(projects).where(projectsWhere(crew, 'layout.edit'));
		expect(editable).toEqual([]);
	});
});

describe('personal tokens', () => {
	it('are told once, stored as a hash, note their use and end when withdrawn', async () => {
		const person = await makePerson('Caller');
		const made = await createToken(person, { name: 'Script', scopes: ['read'], expiresInDays: 30 });
		const [row] = await db.select().from(apiTokens).where(eq(apiTokens.id, made.id));
		expect(JSON.stringify(row)).not.toContain(made.token);
		const verified = await verifyToken(made.token);
		expect(verified).toMatchObject({ tokenId: made.id, scopes: ['read'], user: { email: person.email } });
		const [listed] = await listTokens(person);
		expect(listed.lastUsedAt).not.toBeNull();
		expect(listed).not.toHaveProperty('token');

		const other = await makePerson('Nosy');
		await expectRefused(revokeToken(other, made.id), 'not_found');
		await revokeToken(person, made.id);
		expect(await verifyToken(made.token)).toBeNull();
	});

	it('are refused when expired, altered or invented', async () => {
		const person = await makePerson('Expired');
		const made = await createToken(person, { name: 'Old', scopes: ['read', 'write'], expiresInDays: 1 });
		expect(await verifyToken(`${made.token}x`)).toBeNull();
		expect(await verifyToken('tyd_')).toBeNull();
		await db
			.update(apiTokens)
			.set({ expiresAt: new Date(Date.now() - 1000) })
			.where(eq(apiTokens.id, made.id));
		expect(await verifyToken(made.token)).toBeNull();
	});

	it('that are made with a token end with it at the latest', async () => {
		const person = await makePerson('Lasting');
		const made = await createToken(person, { name: 'Short', scopes: ['write'], expiresInDays: 1 });
		const answer = await callApi('POST', '/api/v1/tokens', {
			token: made.token,
			body: { name: 'Long', scopes: ['read', 'write'], expiresInDays: 365 }
		});
		expect(answer.status).toBe(201);
		expect(answer.body.expiresAt).toBe(made.expiresAt);
	});

	it('are a hundred to a person at most', async () => {
		const person = await makePerson('Minting');
		const make = () => createToken(person, { name: 'One of many', scopes: ['read'], expiresInDays: 1 });
		for (let i = 0; i < 100; i += 1) await make();
		const refused = await expectRefused(make(), 'conflict');
		expect(refused.message).toContain('withdraw one first');
	});

	it('made on the command line are good on the API', async () => {
		const person = await makePerson('Terminal');
		const { stdout } = await promisify(execFile)(process.execPath, ['scripts/token.mjs', person.email]);
		expect(await verifyToken(stdout.trim())).toMatchObject({
			user: { id: person.userId },
			scopes: ['read', 'write']
		});
		await expect(
			promisify(execFile)(process.execPath, ['scripts/token.mjs', 'nobody@tiltyard.test'])
		).rejects.toMatchObject({ stderr: expect.stringContaining('nobody@tiltyard.test') });
	});
});
