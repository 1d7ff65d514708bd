/** Personal API tokens: told once, stored as a hash. */
import { createHash, randomBytes } from 'node:crypto';
import { and, count, desc, eq, gt, isNull, lt, or } from 'drizzle-orm';
import type { MadeToken, Scope, TokenInfo } from '$lib/schema/account';
import { db } from '../db';
import { newId } from '../db/ids';
import { apiTokens, users } from '../db/schema';
import { AppError, notFound } from '../errors';
import type { Actor } from './actor';
import type { SessionUser } from './session';

const prefix = 'tyd_';

/** Tokens carry 256 random bits, so a plain SHA-256 is enough: there is nothing to guess. */
export const hashToken = (token: string): string => createHash('sha256').update(token).digest('hex');

/** A new secret for a link or a token. */
export const newSecret = (): string => randomBytes(32).toString('base64url');

function describe(row: typeof apiTokens.$inferSelect): TokenInfo {
	return {
		id: row.id,
		name: row.name,
		scopes: row.scopes as Scope[],
		createdAt: row.createdAt.toISOString(),
		expiresAt: row.expiresAt?.toISOString() ?? null,
		lastUsedAt: row.lastUsedAt?.toISOString() ?? null
	};
}

export interface TokenWish {
	name: string;
	scopes: Scope[];
	/** null never expires. */
	expiresInDays: number | null;
}

/** Tokens of one person that hold at a time: each has an allowance of calls of its own. */
const MAX_TOKENS = 100;

/**
 * Makes a token and tells its text.
 * @param latest when it ends at the latest: a token that is made with another one must not outlive that
 */
export async function createToken(
	actor: Actor,
	wish: TokenWish,
	latest: Date | null = null
): Promise<MadeToken> {
	const token = prefix + newSecret();
	const createdAt = new Date();
	await refuseTooMany(actor, createdAt);
	const wished =
		wish.expiresInDays === null ? null : new Date(createdAt.getTime() + wish.expiresInDays * 86_400_000);
	const row = {
		id: newId(),
		userId: actor.userId,
		name: wish.name,
		tokenHash: hashToken(token),
		scopes: [...wish.scopes],
		expiresAt: latest && (!wished || wished > latest) ? latest : wished,
		lastUsedAt: null,
		createdAt
	};
	await db.insert(apiTokens).values(row);
	return { ...describe(row), token };
}

async function refuseTooMany(actor: Actor, now: Date): Promise<void> {
	const holding = or(isNull(apiTokens.expiresAt), gt(apiTokens.expiresAt, now));
	const [{ held }] = await db
		.select({ held: count() })
		.from(apiTokens)
		.where(and(eq(apiTokens.userId, actor.userId), holding));
	if (held >= MAX_TOKENS)
		throw new AppError('conflict', `A person keeps at most ${MAX_TOKENS} tokens: withdraw one first.`);
}

export async function listTokens(actor: Actor): Promise<TokenInfo[]> {
	const rows = await db
		.select()
		.from(apiTokens)
		.where(eq(apiTokens.userId, actor.userId))
		.orderBy(desc(apiTokens.id));
	return rows.map(describe);
}

export async function revokeToken(actor: Actor, tokenId: string): Promise<void> {
	const [done] = await db
		.delete(apiTokens)
		.where(and(eq(apiTokens.id, tokenId), eq(apiTokens.userId, actor.userId)));
	if (done.affectedRows === 0) throw notFound();
}

export interface VerifiedToken {
	tokenId: string;
	user: SessionUser;
	scopes: Scope[];
	expiresAt: Date | null;
}

/** Whose token this is; null when it is unknown, withdrawn or expired. Notes its use, at most once a minute. */
export async function verifyToken(token: string): Promise<VerifiedToken | null> {
	if (!token.startsWith(prefix)) return null;
	const now = new Date();
	const [row] = await db
		.select({ token: apiTokens, user: { id: users.id, email: users.email, name: users.name } })
		.from(apiTokens)
		.innerJoin(users, eq(users.id, apiTokens.userId))
		.where(
			and(
				eq(apiTokens.tokenHash, hashToken(token)),
				or(isNull(apiTokens.expiresAt), gt(apiTokens.expiresAt, now))
			)
		);
	if (!row) return null;
	await db
		.update(apiTokens)
		.set({ lastUsedAt: now })
		.where(
			and(
				eq(apiTokens.id, row.token.id),
				or(isNull(apiTokens.lastUsedAt), lt(apiTokens.lastUsedAt, new Date(now.getTime() - 60_000)))
			)
		);
	const { id: tokenId, scopes, expiresAt } = row.token;
	return { tokenId, user: row.user, scopes: scopes as Scope[], expiresAt };
}
