import { describe, expect, it } from 'vitest';
import type { Run } from '$lib/schema';
import { RunFreshness } from './run-freshness.svelte';

const loaded = { id: 'r1', status: 'working', outOfDate: false } as Run;

describe('RunFreshness', () => {
	it('tells a run as the server has it now, and as loaded until then', async () => {
		const runs = new RunFreshness({
			read: async (id) => ({ ok: true, value: { ...loaded, id, status: 'done', outOfDate: true } })
		});
		expect(runs.of(null)).toBeNull();
		expect(runs.of(loaded)).toBe(loaded);
		await runs.look(['r1']);
		expect(runs.of(loaded)).toMatchObject({ status: 'done', outOfDate: true });
		expect(runs.of({ ...loaded, id: 'r2' })).toMatchObject({ status: 'working' });
		runs.forget();
		expect(runs.of(loaded)).toBe(loaded);
	});

	it('keeps what it knows when no answer comes', async () => {
		const runs = new RunFreshness({ read: async () => ({ ok: false, message: 'No answer.', fields: [] }) });
		await runs.look(['r1']);
		expect(runs.of(loaded)).toBe(loaded);
	});
});
