import {
	checkLayout,
	dayOfDate,
	dayShade,
	fillPlot,
	LiveDay,
	mountYear,
	prepareField,
	shadeYear,
	shortestDate,
	winterVerdict,
	type Plot,
	type RunInput
} from '../../src/lib/core';
import type { Bench } from './bench';
import { alikeField, BENCH_YEAR, emptyPlot, FIELDS, model, place, planted, unlikeField } from './fields';
import { shortestDaySuns } from './suns';
import { threadFigures } from './threads';

/** Whole runs are repeated until they have taken this long, at most five times. */
const RUNS = { warmMs: 0, repeats: 5, budgetMs: 4000 };

const yearOf =
	(input: RunInput): (() => void) =>
	() =>
		void shadeYear(input);

export async function yearFigures(bench: Bench): Promise<void> {
	for (const count of bench.options.quick ? [1000] : [1000, 10000]) {
		await threadFigures(bench, 'year', `year.regular.${count}`, alikeField('regular', count));
	}
	for (const field of bench.options.quick ? (['regular'] as const) : FIELDS)
		bench.milliseconds(`year.${field}.1000.ms`, yearOf(alikeField(field, 1000)), RUNS);
	if (!bench.options.quick) {
		bench.milliseconds('yearUnlike.sloped.1000.ms', yearOf(unlikeField('sloped', 1000)), RUNS);
		bench.milliseconds('yearUnlike.planted.1000.ms', yearOf(planted(unlikeField('rough', 1000))), RUNS);
	}
	const hundred = planted(unlikeField('rough', 100));
	bench.milliseconds('yearUnlike.planted.100.ms', yearOf(hundred), RUNS);
}

/** What the page asks for while a tracker is dragged, and the day under the pointer. */
export function previewFigures(bench: Bench): void {
	const moved = (count: number): (() => void) => {
		const suns = shortestDaySuns(100);
		const day = dayOfDate(shortestDate(place.latitudeDeg, BENCH_YEAR));
		const live = new LiveDay(prepareField(alikeField('regular', count)), suns, day);
		let turn = 0;
		return () => {
			turn = (turn + 1) % 50;
			live.move(count >> 1, 30 + turn / 10, 40);
		};
	};
	if (bench.wants('moved.regular.500.ms')) bench.milliseconds('moved.regular.500.ms', moved(500));
	const day = (input: RunInput): (() => void) => {
		const field = prepareField(input);
		return () => {
			const shade = dayShade(field, shortestDate(place.latitudeDeg, input.year), 5, input.utcOffsetMinutes);
			winterVerdict(shade, input.layout, place, input.winterRule);
		};
	};
	for (const count of [100, 1000]) {
		bench.milliseconds(`day.regular.${count}.ms`, day(alikeField('regular', count)));
		bench.milliseconds(`dayUnlike.rough.${count}.ms`, day(unlikeField('rough', count)));
	}
}

export function mountFigures(bench: Bench): void {
	const mounts = (input: RunInput) => () => void mountYear(input);
	bench.milliseconds('mounts.regular.100.ms', mounts(alikeField('regular', 100)), RUNS);
	if (bench.options.quick) return;
	bench.milliseconds('mounts.regular.1000.ms', mounts(alikeField('regular', 1000)), RUNS);
	bench.milliseconds('mountsUnlike.planted.100.ms', mounts(planted(unlikeField('rough', 100))), RUNS);
}

export function layoutFigures(bench: Bench): void {
	if (!bench.wants('fill.') && !bench.wants('checks.')) return;
	const plot: Plot = {
		...emptyPlot,
		boundary: [
			{
				outer: [
					[0, 0],
					[700, -40],
					[820, 300],
					[640, 620],
					[80, 560]
				],
				holes: []
			}
		],
		setBackM: 4
	};
	const grid = { plot, model, pitchEastWestM: 14, pitchNorthSouthM: 12, stagger: 0.5, turnDeg: 12 };
	bench.milliseconds('fill.open.2000.ms', () => void fillPlot(grid), { budgetMs: 1500 });
	const { layout } = alikeField('regular', 1);
	const trackers = fillPlot(grid).map(([eastM, northM], k) => ({
		...layout.trackers[0],
		id: `t${k}`,
		tag: `T${k}`,
		eastM,
		northM
	}));
	bench.milliseconds('checks.open.2000.ms', () => void checkLayout(plot, { ...layout, trackers }), {
		budgetMs: 1500
	});
}
