/** People for integration tests: made by the same use cases as on the pages, with a role where it is asked for. */
import type { Role } from '$lib/access';
import type { Actor } from '$lib/server/auth/actor';
import { signUp } from '$lib/server/auth/sign-up';
import { db } from '$lib/server/db';
import { projectMembers, teamMembers } from '$lib/server/db/schema';
import { AppError, type ErrorCode } from '$lib/server/errors';
import { eq } from 'drizzle-orm';
import { expect } from 'vitest';

let count = 0;

export const testPassword = 'four plain words here';

/** Somebody with a team of their own. */
export async function makePerson(name = 'Somebody'): Promise<Actor & { email: string; teamId: string }> {
	count += 1;
	const email = `${name.toLowerCase().replace(/\W+/g, '-')}-${count}@tiltyard.test`;
	const actor = await signUp(
		{ name, teamName: `Team of ${name}`, email, password: testPassword },
		`test-${count}`
	);
	const [membership] = await db.select().from(teamMembers).where(eq(teamMembers.userId, actor.userId));
	return { ...actor, email, teamId: membership.teamId };
}

export async function joinTeam(teamId: string, actor: Actor, role: Role): Promise<void> {
	await db.insert(teamMembers).values({ teamId, userId: actor.userId, role, createdAt: new Date() });
}

export async function joinProject(projectId: string, actor: Actor, role: Role): Promise<void> {
	await db.insert(projectMembers).values({ projectId, userId: actor.userId, role, createdAt: new Date() });
}

/** The work must be refused with this code. */
export async function expectRefused(work: Promise<unknown>, code: ErrorCode): Promise<AppError> {
	const outcome = await work.then(
		() => null,
		(error: unknown) => error
	);
	expect(outcome, `should be refused with ${code}, but went through`).not.toBeNull();
	if (!(outcome instanceof AppError)) throw outcome;
	expect(outcome.code).toBe(code);
	return outcome;
}
