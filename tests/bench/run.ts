import {
	checkLayout,
	dayShade,
	fieldShade,
	fillPlot,
	mountYear,
	moveTracker,
	prepareField,
	shadeYear,
	shortestDate,
	sunPosition,
	winterVerdict,
	type Plot
} from '../../src/lib/core';
import { alikeField, model, place, unlikeField } from './fields';

const SEED = 20261201;
export type Figures = Record<string, number>;

/** Work is repeated so long before it is measured, milliseconds: the compiler's own time is no figure of ours. */
const WARM_MS = 400;

/**
 * Mean processor milliseconds of some runs, after a warm-up. Processor time and not the clock, because others may be
 * working on the same machine.
 */
function milliseconds(runs: number, work: () => void): number {
	const start = performance.now();
	do work();
	while (performance.now() - start < WARM_MS);
	const before = process.cpuUsage();
	for (let k = 0; k < runs; k++) work();
	const used = process.cpuUsage(before);
	return (used.user + used.system) / 1000 / runs;
}

/** Runs everything; `say` hears each figure as it comes. Names: effect.field.N.unit. */
export function measure(say: (line: string) => void): Figures {
	const figures: Figures = {};
	const note = (name: string, value: number) => {
		figures[name] = Number(value.toPrecision(4));
		say(`${name} ${figures[name]}`);
	};
	const sunAt = (minute: number) => {
		const sun = sunPosition(Date.UTC(2026, 11, 21, 7, minute), place.latitudeDeg, place.longitudeDeg);
		return { azimuthDeg: sun.azimuthDeg, elevationDeg: Math.max(0.5, sun.apparentElevationDeg) };
	};

	note(
		'sunPosition.any.1000.ms',
		milliseconds(15, () => {
			for (let k = 0; k < 1000; k++) sunPosition(Date.UTC(2026, 0, 1) + k * 31e6, 41, 14);
		})
	);
	for (const [name, make] of [
		['alike', (n: number) => alikeField(n)],
		['unlike', (n: number) => unlikeField(n, SEED)]
	] as const) {
		for (const count of [100, 1000]) {
			const input = make(count);
			const field = prepareField(input);
			let minute = 0;
			note(
				`fieldShade.${name}.${count}.ms`,
				milliseconds(60, () => {
					minute = (minute + 7) % 480;
					fieldShade(field, sunAt(minute));
				})
			);
			note(
				`moveTracker.${name}.${count}.ms`,
				milliseconds(60, () => {
					minute = (minute + 7) % 480;
					fieldShade(moveTracker(field, count >> 1, 30 + minute / 100, 40), sunAt(minute));
				})
			);
			note(
				`dayShade.${name}.${count}.ms`,
				milliseconds(5, () => {
					const day = dayShade(field, shortestDate(41, 2026), 5, 60);
					winterVerdict(day, input.layout, place, input.winterRule);
				})
			);
		}
		for (const count of name === 'alike' ? [100, 1000] : [100]) {
			const input = make(count);
			note(
				`shadeYear.${name}.${count}.ms`,
				milliseconds(count > 500 ? 1 : 3, () => {
					shadeYear(input);
				})
			);
		}
		note(
			`mountYear.${name}.100.ms`,
			milliseconds(1, () => {
				mountYear(make(100));
			})
		);
	}
	const plot: Plot = {
		version: 1,
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
		ground: { kind: 'level', heightM: 0 },
		skyline: [],
		obstacles: [],
		setBackM: 4
	};
	const grid = { plot, model, pitchEastWestM: 14, pitchNorthSouthM: 12, stagger: 0.5, turnDeg: 12 };
	note(
		'fillPlot.open.2000.ms',
		milliseconds(5, () => {
			fillPlot(grid);
		})
	);
	const layout = alikeField(1).layout;
	const trackers = fillPlot(grid).map(([eastM, northM], k) => ({
		...layout.trackers[0],
		id: `t${k}`,
		tag: `T${k}`,
		eastM,
		northM
	}));
	say(`the plot holds ${trackers.length} trackers`);
	note(
		'checkLayout.open.2000.ms',
		milliseconds(9, () => {
			checkLayout(plot, { ...layout, trackers });
		})
	);
	return figures;
}
