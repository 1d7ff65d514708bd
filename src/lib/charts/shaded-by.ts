import {
	fieldShade,
	fieldSunHidden,
	prepareField,
	shadeScene,
	sunVector,
	tableAxes,
	trackerPoses,
	type Field
} from '$lib/core';

type Sun = { azimuthDeg: number; elevationDeg: number };

interface Caster {
	index: number;
	/** Part of the table that this one alone would shade, 0..1. */
	share: number;
}

/**
 * The trackers whose tables shade one tracker's table at a moment, most first, as indices in layout order. Each is tried alone against the
 * target with the core's exact areas; obstacles and skyline are left out.
 */
export function castersOf(field: Field, target: number, sun: Sun): number[] {
	return casters(field, target, sun).map((caster) => caster.index);
}

/** Names of the obstacles that shade one tracker's table at a moment of a day of the year (1..366), most first, each tried alone. */
export function obstacleCastersOf(field: Field, target: number, sun: Sun, dayOfYear: number): string[] {
	return obstacleCasters(field, target, sun, dayOfYear).map(
		(caster) => field.plot.obstacles[caster.index].name
	);
}

/** Fields above this many trackers are asked at one moment only, to keep the page quick. */
const sampledFieldsTo = 600;
const samples = 12;

/**
 * Who shades one tracker over some moments of a day, as tags and obstacle names: by the shade that each throws alone,
 * most first. `moments` are suns, the worst first; trees stand as on `dayOfYear`, 1..366.
 */
export function dayCauses(
	field: Field,
	target: number,
	moments: readonly Sun[],
	dayOfYear: number
): string[] {
	const taken = moments.slice(0, field.layout.trackers.length > sampledFieldsTo ? 1 : samples);
	const sums = new Map<string, number>();
	const add = (name: string, share: number) => sums.set(name, (sums.get(name) ?? 0) + share);
	for (const sun of taken) {
		for (const { index, share } of casters(field, target, sun)) add(field.layout.trackers[index].tag, share);
		for (const { index, share } of obstacleCasters(field, target, sun, dayOfYear)) {
			add(field.plot.obstacles[index].name, share);
		}
	}
	return [...sums].sort((a, b) => b[1] - a[1]).map(([name]) => name);
}

function obstacleCasters(field: Field, target: number, sun: Sun, dayOfYear: number): Caster[] {
	const tracker = field.layout.trackers[target];
	if (!tracker || fieldSunHidden(field, sun) || noSunWords(field, target, sun) !== null) return [];
	const { place, plot, treeYears } = field;
	const found = plot.obstacles.map((obstacle, index): Caster => {
		const alone = prepareField({
			place,
			plot: { ...plot, obstacles: [obstacle], skyline: [] },
			layout: { ...field.layout, trackers: [tracker] },
			treeYears
		});
		return { index, share: fieldShade(alone, sun, dayOfYear)[0] };
	});
	return found.filter((caster) => caster.share > 1e-9).sort((a, b) => b.share - a.share);
}

function casters(field: Field, target: number, sun: Sun): Caster[] {
	if (fieldSunHidden(field, sun)) return [];
	const poses = trackerPoses(field, sun);
	const tables = poses.map((pose, index) => ({
		id: String(index),
		eastM: pose.centre[0],
		northM: pose.centre[1],
		upM: pose.centre[2],
		widthM: pose.widthM,
		heightM: pose.heightM,
		azimuthDeg: pose.azimuthDeg,
		tiltDeg: pose.tiltDeg
	}));
	const goal = tables[target];
	if (!goal) return [];
	const found: Caster[] = [];
	tables.forEach((table, index) => {
		if (index === target || !mayShade(goal, table, sun)) return;
		// The frame beyond the glass throws shade as well.
		const margin = 2 * field.models[index].frameMarginM;
		const steel = { ...table, widthM: table.widthM + margin, heightM: table.heightM + margin };
		const [shaded] = shadeScene({ sun, tables: [goal, steel], obstacles: [], skyline: [] });
		if (shaded.frontLit && shaded.shadedShare > 1e-9) found.push({ index, share: shaded.shadedShare });
	});
	return found.sort((a, b) => b.share - a.share);
}

/** Why no sun can reach a table whatever stands around it, as the end of a sentence; null when it could. */
export function noSunWords(field: Field, target: number, sun: Sun): string | null {
	if (sun.elevationDeg <= 0) return 'the sun is down';
	if (fieldSunHidden(field, sun)) return 'the sun is behind the skyline';
	const pose = trackerPoses(field, sun)[target];
	if (!pose) return null;
	const s = sunVector(sun.azimuthDeg, sun.elevationDeg);
	const { n } = tableAxes(pose.azimuthDeg, pose.tiltDeg);
	return n[0] * s[0] + n[1] * s[1] + n[2] * s[2] <= 0 ? 'its back is to the sun' : null;
}

interface Box {
	eastM: number;
	northM: number;
	widthM: number;
	heightM: number;
}

/** Up-sun in plan, and not farther aside than both tables reach: spares most of the exact tests. */
function mayShade(goal: Box, other: Box, sun: Sun): boolean {
	const azimuth = (sun.azimuthDeg * Math.PI) / 180;
	const [east, north] = [other.eastM - goal.eastM, other.northM - goal.northM];
	const reach = (Math.hypot(goal.widthM, goal.heightM) + Math.hypot(other.widthM, other.heightM)) / 2;
	const ahead = east * Math.sin(azimuth) + north * Math.cos(azimuth);
	const aside = Math.abs(east * Math.cos(azimuth) - north * Math.sin(azimuth));
	return ahead > -reach && aside < reach;
}
