import { prepareField, sunPosition, type RunInput, type SunDirection } from '../../src/lib/core';
import type { Bench } from './bench';
import { alikeField, FIELDS, planted, unlikeField } from './fields';
import { everySun } from './suns';

export const COUNTS = [10, 100, 1000, 10000] as const;

/** Every k-th sun of the year, so that one repeat of the largest fields stays near a second. */
const ALIKE_EVERY = { 10: 1, 100: 1, 1000: 1, 10000: 13 } as const;
const UNLIKE_EVERY = { 10: 1, 100: 3, 1000: 29, 10000: 397 } as const;
/** Quick runs take this many times fewer suns. */
const QUICK_FEWER = 11;

/** Shaded shares of all tables under all these suns: the rate once the field is prepared. */
function sharesOf(bench: Bench, name: string, input: () => RunInput, every: number): void {
	if (!bench.wants(name)) return;
	const k = bench.options.quick ? every * QUICK_FEWER : every;
	const suns: SunDirection[] = everySun(k);
	const { engine } = prepareField(input());
	const shares = new Float64Array(engine.count);
	bench.tableSuns(
		name,
		engine.count * suns.length,
		() => {
			for (const sun of suns) {
				engine.setSun(sun.azimuthDeg, sun.elevationDeg);
				engine.shares(shares);
			}
		},
		k > 1 ? `1 sun in ${k}` : '',
		{ repeats: bench.options.quick ? 3 : 5 }
	);
}

export function sunFigures(bench: Bench): void {
	bench.milliseconds('sun.any.1000.ms', () => {
		for (let k = 0; k < 1000; k++) sunPosition(Date.UTC(2026, 0, 1) + k * 31e6, 41, 14);
	});
}

/** The counts that this run takes. */
const countsOf = (bench: Bench): readonly (typeof COUNTS)[number][] =>
	bench.options.quick ? COUNTS.filter((count) => count <= 1000) : COUNTS;

/** Preparing a field, everything included that stands before the first sun. */
export function listFigures(bench: Bench): void {
	for (const field of FIELDS) {
		for (const count of countsOf(bench)) {
			const input = alikeField(field, count);
			bench.milliseconds(`lists.${field}.${count}.ms`, () => void prepareField(input), { budgetMs: 500 });
		}
	}
	const unlike = unlikeField('sloped', 1000);
	bench.milliseconds('listsUnlike.sloped.1000.ms', () => void prepareField(unlike), { budgetMs: 500 });
}

export function shareFigures(bench: Bench): void {
	for (const field of FIELDS) {
		for (const count of countsOf(bench)) {
			const name = `alike.${field}.${count}.tableSunsPerS`;
			sharesOf(bench, name, () => alikeField(field, count), ALIKE_EVERY[count]);
		}
	}
	for (const field of FIELDS) {
		for (const count of countsOf(bench)) {
			const name = `unlike.${field}.${count}.tableSunsPerS`;
			sharesOf(bench, name, () => unlikeField(field, count), UNLIKE_EVERY[count]);
		}
	}
	const name = 'unlike.planted.1000.tableSunsPerS';
	sharesOf(bench, name, () => planted(unlikeField('rough', 1000)), UNLIKE_EVERY[1000]);
}
