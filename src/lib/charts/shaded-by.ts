import { fieldSunHidden, shadeScene, sunVector, tableAxes, trackerPoses, type Field } from '$lib/core';

type Sun = { azimuthDeg: number; elevationDeg: number };

interface Caster {
	index: number;
	/** Part of the table that this neighbour alone would shade, 0..1. */
	share: number;
}

/**
 * The trackers whose tables shade one tracker's table at a moment, most first, as indices in layout order. Each is tried alone against the
 * target with the core's exact areas; obstacles and skyline are left out.
 */
export function castersOf(field: Field, target: number, sun: Sun): number[] {
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
	return found.sort((a, b) => b.share - a.share).map((caster) => caster.index);
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
