/** Counts tries in the database, so that a restart or a second process forgets none. */
import { createHash } from 'node:crypto';
import { and, asc, eq, gt, lt } from 'drizzle-orm';
import { db } from '../db';
import { newId } from '../db/ids';
import { signInAttempts } from '../db/schema';
import { AppError } from '../errors';

interface Limit {
	most: number;
	windowMinutes: number;
	/** What was tried, to begin the sentence: "Too many …". */
	what: string;
}

const limits = {
	/** Wrong passwords for one address from one host. */
	'sign-in': { most: 6, windowMinutes: 15, what: 'tries to sign in' },
	/** Wrong passwords from one host, whatever the address: somebody who goes through a list. */
	'sign-in-host': { most: 60, windowMinutes: 15, what: 'tries to sign in from your network' },
	'sign-up': { most: 60, windowMinutes: 60, what: 'sign-ups from your network' },
	/** Letters to one address. */
	reset: { most: 4, windowMinutes: 60, what: 'reset letters for this address' },
	/** Letters to whomever, with words of the sender's own in them. */
	invite: { most: 60, windowMinutes: 60, what: 'invitations' },
	'reset-host': { most: 40, windowMinutes: 60, what: 'reset requests from your network' }
} as const satisfies Record<string, Limit>;

type Kind = keyof typeof limits;

const bucketOf = (kind: Kind, who: string): string =>
	`${kind}:${createHash('sha256').update(who).digest('hex').slice(0, 48)}`;

/**
 * Notes one try and refuses it when there were too many. It is noted before anything is checked, so that many
 * tries at the same moment can't slip through together.
 * @returns the id of this try, for `forgetAttempt`
 */
export async function countAttempt(kind: Kind, who: string): Promise<string> {
	const { most, windowMinutes, what } = limits[kind];
	const bucket = bucketOf(kind, who);
	const now = Date.now();
	const since = new Date(now - windowMinutes * 60_000);
	const id = newId(now);
	await db.insert(signInAttempts).values({ id, bucket, at: new Date(now) });
	const tries = await db
		.select({ at: signInAttempts.at })
		.from(signInAttempts)
		.where(and(eq(signInAttempts.bucket, bucket), gt(signInAttempts.at, since)))
		.orderBy(asc(signInAttempts.at))
		.limit(most + 1);
	if (tries.length <= most) return id;
	// A refused try does not count: who goes on trying is not locked out for longer.
	await db.delete(signInAttempts).where(eq(signInAttempts.id, id));
	const seconds = Math.max(1, Math.ceil((tries[0].at.getTime() + windowMinutes * 60_000 - now) / 1000));
	const minutes = Math.ceil(seconds / 60);
	throw new AppError(
		'too_many',
		`Too many ${what}. Wait ${minutes} ${minutes === 1 ? 'minute' : 'minutes'}, then try again.`,
		{ retryAfterSeconds: seconds }
	);
}

/** Forgets one try, which was a right one; those before it go on counting. */
export async function forgetAttempt(id: string): Promise<void> {
	await db.delete(signInAttempts).where(eq(signInAttempts.id, id));
}

/** Forgets all tries after a right one. */
export async function forgiveAttempts(kind: Kind, who: string): Promise<void> {
	await db.delete(signInAttempts).where(eq(signInAttempts.bucket, bucketOf(kind, who)));
}

/** Takes out what no limit looks at any more. */
export async function sweepAttempts(): Promise<void> {
	await db.delete(signInAttempts).where(lt(signInAttempts.at, new Date(Date.now() - 24 * 3_600_000)));
}
