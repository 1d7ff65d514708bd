import { afterAll, expect, it } from 'vitest';
import { fieldLossRequestSchema, sunRequestSchema } from '$lib/schema/compute';
import { calculate } from '$lib/server/compute/calculate';
import { stopPool } from '$lib/server/compute/pool';

afterAll(stopPool);

/** Takes minutes: it is still at work when the test ends. */
const long = fieldLossRequestSchema.parse({
	latitudeDeg: 41,
	longitudeDeg: 15,
	year: 2026,
	stepMinutes: 1,
	model: { widthM: 9, heightM: 6 },
	trackers: Array.from({ length: 2000 }, (_, i) => ({
		id: String(i),
		eastM: (i % 45) * 8,
		northM: Math.floor(i / 45) * 8
	}))
});
const short = sunRequestSchema.parse({ latitudeDeg: 41, longitudeDeg: 15, times: ['2026-12-21T11:00:00Z'] });

it('many long calculations of one person do not keep the others waiting, and one more than enough is refused', async () => {
	const greedy = { userId: 'greedy' };
	const ended: string[] = [];
	const note = (what: string) => () => void ended.push(what);
	for (let i = 0; i < 32; i += 1)
		calculate(greedy, { kind: 'field-loss', request: long }).then(note('long'), note('long'));
	await expect(calculate(greedy, { kind: 'sun', request: short })).rejects.toMatchObject({
		code: 'too_many'
	});
	const other = await calculate({ userId: 'other' }, { kind: 'sun', request: short });
	expect(other).toHaveLength(1);
	expect(ended).toEqual([]);
}, 60_000);
