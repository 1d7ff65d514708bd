import {
	prepareField,
	shadeSums,
	sunPosition,
	sunTable,
	type RunInput,
	type SunDirection
} from '../../src/lib/core';
import type { Bench } from './bench';
import { alikeField, FIELDS, planted, unlikeField } from './fields';
import { everySun } from './suns';

export const COUNTS = [10, 100, 1000, 10000] as const;

/** Alike tables take every sun of the year, unlike ones every k-th: thin sets bear more of the lists and look slower. */
const ALIKE_EVERY = 1;
const UNLIKE_EVERY = { 10: 1, 100: 1, 1000: 5, 10000: 41 } as const;
/** Quick runs take this many times fewer suns. */
const QUICK_FEWER = 11;

/** Where the sums of a run go: month by hour. */
const BINS = 288;

const named = (k: number, suns: number): string =>
	k > 1 ? `1 sun in ${k} of the year, ${suns} suns` : `every sun of the year, ${suns} suns`;

/** Shade of all tables under all these suns as a year run sums it, its lists of neighbours included. */
function sharesOf(bench: Bench, name: string, input: () => RunInput, every: number): void {
	if (!bench.wants(name)) return;
	const k = bench.options.quick ? every * QUICK_FEWER : every;
	const suns = everySun(k);
	const table = sunTable(suns.map((sun, at) => ({ ...sun, weight: 1, bin: at % BINS, day: 1 + (at % 365) })));
	const { engine } = prepareField(input());
	const repeats = bench.options.quick ? 3 : 5;
	const work = (): void => void shadeSums(engine, table, BINS);
	bench.tableSuns(name, engine.count * suns.length, work, named(k, suns.length), { repeats });
}

/** The same asked sun by sun, as pages and previews do. */
function sunBySun(bench: Bench, name: string, input: () => RunInput, every: number): void {
	if (!bench.wants(name)) return;
	const k = bench.options.quick ? every * QUICK_FEWER : every;
	const suns: SunDirection[] = everySun(k);
	const { engine } = prepareField(input());
	const shares = new Float64Array(engine.count);
	const work = (): void => {
		for (const sun of suns) {
			engine.setSun(sun.azimuthDeg, sun.elevationDeg);
			engine.shares(shares);
		}
	};
	bench.tableSuns(name, engine.count * suns.length, work, named(k, suns.length));
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
			sharesOf(bench, name, () => alikeField(field, count), ALIKE_EVERY);
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
	sunBySun(bench, 'sunBySun.regular.1000.tableSunsPerS', () => alikeField('regular', 1000), 7);
	const unlike = (): RunInput => unlikeField('sloped', 1000);
	sunBySun(bench, 'sunBySunUnlike.sloped.1000.tableSunsPerS', unlike, UNLIKE_EVERY[1000]);
}
