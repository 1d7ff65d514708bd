import { AppError } from '../errors';

/** Allowance of one caller: so many units at once, and so many that come back a second. */
const BURST = Number(process.env.API_BURST ?? 600);
const PER_SECOND = Number(process.env.API_PER_SECOND ?? 20);

interface Bucket {
	left: number;
	atMs: number;
}

const buckets = new Map<string, Bucket>();
const MAX_BUCKETS = 10_000;

/** A bucket that is full again need not be remembered. */
function forgetFull(nowMs: number): void {
	for (const [key, bucket] of buckets) {
		if (bucket.left + ((nowMs - bucket.atMs) / 1000) * PER_SECOND >= BURST) buckets.delete(key);
	}
}

/** Takes a call's cost from the caller's allowance; refuses with the seconds to wait when it is used up. */
export function takeAllowance(caller: string, cost: number, nowMs = Date.now()): void {
	if (buckets.size >= MAX_BUCKETS) forgetFull(nowMs);
	const bucket = buckets.get(caller) ?? { left: BURST, atMs: nowMs };
	bucket.left = Math.min(BURST, bucket.left + ((nowMs - bucket.atMs) / 1000) * PER_SECOND);
	bucket.atMs = nowMs;
	buckets.set(caller, bucket);
	if (bucket.left < cost) {
		const waitS = Math.max(1, Math.ceil((cost - bucket.left) / PER_SECOND));
		throw new AppError('too_many', `This is more than is answered at a time: wait ${waitS} s.`, {
			retryAfterSeconds: waitS
		});
	}
	bucket.left -= cost;
}
