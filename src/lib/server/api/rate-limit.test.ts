import { describe, expect, it } from 'vitest';
import { AppError } from '../errors';
import { takeAllowance } from './rate-limit';

describe('the allowance of a caller', () => {
	it('is used up by many calls at once, says how long to wait, and comes back', () => {
		const begin = 1_000_000;
		let refused: unknown = null;
		for (let call = 0; call < 100_000 && !refused; call += 1) {
			try {
				takeAllowance('one', 1, begin);
			} catch (error) {
				refused = error;
			}
		}
		expect(refused).toBeInstanceOf(AppError);
		const waitS = (refused as AppError).details.retryAfterSeconds ?? 0;
		expect((refused as AppError).status).toBe(429);
		expect(waitS).toBeGreaterThan(0);
		expect(() => takeAllowance('one', 1, begin + waitS * 1000)).not.toThrow();
	});

	it('is each caller’s own', () => {
		expect(() => takeAllowance('another', 1, 1_000_000)).not.toThrow();
	});
});
