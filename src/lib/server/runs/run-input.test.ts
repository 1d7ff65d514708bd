import { describe, expect, it } from 'vitest';
import { emptyLayout, emptyPlot, defaultWinterRule } from '$lib/schema';
import { canonicalJson } from './canonical-json';
import { runInput, runInputHash, type RunSources } from './run-input';

const sources: RunSources = {
	place: {
		latitudeDeg: 41.2,
		longitudeDeg: 14.8,
		altitudeM: 420,
		timeZone: 'Europe/Rome',
		magneticDeclinationDeg: 3.6
	},
	winterRule: defaultWinterRule,
	plot: emptyPlot(),
	layout: emptyLayout()
};
const terms = { year: 2026, stepMinutes: 10, treeYears: 0 };

describe('the input of a run', () => {
	it('carries the standard-time offset of the place, not summer time', () => {
		expect(runInput(sources, terms).utcOffsetMinutes).toBe(60);
	});

	it('has the same hash whatever the order of names and whichever mounts are chosen', () => {
		const hash = runInputHash('shade', runInput(sources, terms));
		const chosen = structuredClone(sources);
		chosen.layout.mounts.common = { edge: 'top', alongM: 0, outM: 0.08, forwardM: 0.03 };
		expect(runInputHash('shade', runInput(chosen, terms))).toBe(hash);
		expect(canonicalJson({ b: 1, a: { d: [2, { f: 1, e: 2 }], c: 3 } })).toBe(
			'{"a":{"c":3,"d":[2,{"e":2,"f":1}]},"b":1}'
		);
	});

	it('has another hash when the plot, the year or the kind is another', () => {
		const hash = runInputHash('shade', runInput(sources, terms));
		const moved = structuredClone(sources);
		moved.plot.setBackM += 0.001;
		expect(runInputHash('shade', runInput(moved, terms))).not.toBe(hash);
		expect(runInputHash('shade', runInput(sources, { ...terms, year: 2027 }))).not.toBe(hash);
		expect(runInputHash('mounts', runInput(sources, terms))).not.toBe(hash);
	});

	it('counts the winter rule for shade only', () => {
		const other: RunSources = { ...sources, winterRule: { kind: 'clear-above', elevationDeg: 5 } };
		expect(runInputHash('shade', runInput(other, terms))).not.toBe(
			runInputHash('shade', runInput(sources, terms))
		);
		expect(runInputHash('mounts', runInput(other, terms))).toBe(
			runInputHash('mounts', runInput(sources, terms))
		);
	});
});
