import { hash, verify } from '@node-rs/argon2';

/** Argon2id with OWASP's second recommended setting: 19 MiB, 2 passes, 1 lane (Password Storage Cheat Sheet). */
const cost = { memoryCost: 19 * 1024, timeCost: 2, parallelism: 1 };

export const hashPassword = (password: string): Promise<string> => hash(password, cost);

let decoy: Promise<string> | undefined;

/**
 * Whether the password fits. Without an account it spends the same time on a hash that nothing fits, so that the
 * answer's delay does not tell which addresses have accounts.
 */
export async function passwordFits(passwordHash: string | null, password: string): Promise<boolean> {
	decoy ??= hashPassword('nobody signs in with this');
	const fits = await verify(passwordHash ?? (await decoy), password);
	return passwordHash !== null && fits;
}
