import { describe, expect, it } from 'vitest';
import { trailSteps, type TrailFacts } from './trail-state';

const fresh: TrailFacts = {
	role: 'designer',
	boundaryParts: 0,
	trackers: 0,
	findings: 0,
	shade: null,
	mounts: null,
	winterRuleBrokenBy: null,
	mountChosen: false,
	plans: [],
	layoutRevision: 1,
	plotRevision: 1
};
const done = { status: 'done', outOfDate: false } as const;
const states = (facts: Partial<TrailFacts>) => trailSteps({ ...fresh, ...facts }).map((step) => step.state);
const step = (key: string, facts: Partial<TrailFacts>) =>
	trailSteps({ ...fresh, ...facts }).find((each) => each.key === key);

describe('the trail', () => {
	it('starts with nothing done and says what comes first', () => {
		expect(states({})).toEqual(['nothing', 'nothing', 'nothing', 'nothing', 'nothing', 'nothing']);
		expect(step('plot', {})?.next).toContain('boundary');
	});

	it('ends with every step of the desk settled', () => {
		const facts: Partial<TrailFacts> = {
			boundaryParts: 1,
			trackers: 18,
			shade: done,
			mounts: done,
			winterRuleBrokenBy: 0,
			mountChosen: true,
			plans: [{ revision: 'A', layoutRevision: 1, plotRevision: 1 }]
		};
		expect(states(facts).slice(0, 5)).toEqual(Array(5).fill('settled'));
	});

	it('counts open findings and trackers that break the winter rule', () => {
		expect(step('trackers', { trackers: 4, findings: 2 })).toMatchObject({ state: 'open', count: 2 });
		expect(step('shade', { shade: done, winterRuleBrokenBy: 1 })).toMatchObject({
			state: 'open',
			count: 1,
			next: 'Winter rule broken by 1 tracker.'
		});
	});

	it('opens a step again when the layout has changed since', () => {
		expect(step('shade', { shade: { status: 'done', outOfDate: true } })?.state).toBe('open');
		expect(
			step('plan', { plans: [{ revision: 'B', layoutRevision: 1, plotRevision: 1 }], layoutRevision: 2 })
				?.next
		).toBe('The layout has changed since revision B was issued.');
		// Ground and boundary make the levels and the set-back of the sheets.
		expect(
			step('plan', { plans: [{ revision: 'B', layoutRevision: 1, plotRevision: 1 }], plotRevision: 2 })
		).toMatchObject({ state: 'open', next: 'The plot has changed since revision B was issued.' });
	});

	it('shows running and failed work as such', () => {
		expect(step('mounts', {})).toBeUndefined();
		expect(step('sensors', { mounts: { status: 'working', outOfDate: false } })?.state).toBe('working');
		expect(step('shade', { shade: { status: 'failed', outOfDate: false } })?.next).toContain('failed');
	});

	it('leads a client past plan and site, and the crew to both', () => {
		const keys = (role: TrailFacts['role']) => trailSteps({ ...fresh, role }).map((each) => each.key);
		expect(keys('client')).toEqual(['plot', 'trackers', 'shade', 'sensors']);
		expect(keys('crew')).toContain('site');
	});

	it('tells those who may not edit how things stand, not what to do', () => {
		for (const role of ['client', 'crew'] as const) {
			for (const each of trailSteps({ ...fresh, role })) expect(each.next).not.toMatch(/^Next/);
		}
		expect(step('shade', { role: 'client', shade: done, winterRuleBrokenBy: 2 })?.next).toContain(
			'2 trackers'
		);
	});
});
