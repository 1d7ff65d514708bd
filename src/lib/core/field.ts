import type { SunDirection } from './conventions';
import type { Layout, Place, Plot, Posture, TrackerModel } from './document';
import { groundHeightM } from './geometry/ground';
import { prepareSkyline, sunHidden, type PreparedSkyline } from './geometry/skyline';
import { terrainHorizons, type TerrainHorizons } from './geometry/terrain-horizon';
import { aimOf, type Aim } from './machine/aim';
import { centreOffset } from './machine/pose';
import { ShadeEngine } from './shade/engine';
import type { TableGroup } from './shade/table-group';
import { obstacleSolids } from './shade/obstacle-solids';

/** A layout on its plot, ready to be asked for shade again and again. Make it once and reuse it between calls. */
export interface Field {
	readonly place: Place;
	readonly plot: Plot;
	readonly layout: Layout;
	readonly treeYears: number;
	readonly skyline: PreparedSkyline;
	/** Model of each tracker, in layout order. */
	readonly models: readonly TrackerModel[];
	readonly engine: ShadeEngine;
	/** Near skylines of measured ground by tracker; null on level and sloping planes. */
	readonly horizons: TerrainHorizons | null;
}

export interface FieldInput {
	place: Place;
	plot: Plot;
	layout: Layout;
	/** Years that the trees have grown since the plot was recorded. */
	treeYears?: number;
}

/** What throws and takes the shade: glass takes it, glass and frame margin throw it; the slot in the middle is clear. */
export function tableGroup(model: TrackerModel, posture: Posture): TableGroup {
	const sun: SunDirection = { azimuthDeg: 0, elevationDeg: 0 };
	const stands = posture.kind === 'standing' || posture.kind === 'night';
	const fixedAim = stands ? aimOf(model, posture, sun) : null;
	const still = fixedAim ? { ...fixedAim, offset: centreOffset(model, fixedAim) } : null;
	const aimAt = (azimuthDeg: number, elevationDeg: number): Aim => {
		if (still) return still;
		sun.azimuthDeg = azimuthDeg;
		sun.elevationDeg = elevationDeg;
		return aimOf(model, posture, sun);
	};
	return {
		halfWidth: model.widthM / 2,
		halfHeight: model.heightM / 2,
		steelHalfWidth: model.widthM / 2 + model.frameMarginM,
		steelHalfHeight: model.heightM / 2 + model.frameMarginM,
		halfGap: Math.max(0, Math.min(model.centreGapM, model.widthM)) / 2,
		offsetReach: Math.abs(model.tiltAxisOffsetM) + Math.hypot(model.tableOffsetM, model.centreShiftM),
		aimAt,
		poseAt(azimuthDeg, elevationDeg) {
			if (still) return still;
			const aim = aimAt(azimuthDeg, elevationDeg);
			return { ...aim, offset: centreOffset(model, aim) };
		}
	};
}

const postureKey = (posture: Posture): string =>
	posture.kind === 'standing' ? `standing ${posture.azimuthDeg} ${posture.tiltDeg}` : posture.kind;

/**
 * Prepares a field: feet and obstacles on the ground, near skylines where the ground was measured. Throws only when a tracker names a model
 * that the layout does not hold, which is a programmer's mistake: layouts are checked where they come in.
 */
export function prepareField(input: FieldInput): Field {
	const { place, plot, layout } = input;
	const treeYears = input.treeYears ?? 0;
	const byId = new Map(layout.models.map((model) => [model.id, model]));
	const count = layout.trackers.length;
	const east = new Float64Array(count);
	const north = new Float64Array(count);
	const up = new Float64Array(count);
	const groupOf = new Int32Array(count);
	const groups: TableGroup[] = [];
	const groupIndex = new Map<string, number>();
	const models: TrackerModel[] = [];
	layout.trackers.forEach((tracker, i) => {
		const model = byId.get(tracker.modelId);
		if (!model)
			throw new Error(`Tracker ${tracker.tag} uses the model ${tracker.modelId}, which is not in its layout`);
		models.push(model);
		east[i] = tracker.eastM;
		north[i] = tracker.northM;
		up[i] =
			groundHeightM(plot.ground, tracker.eastM, tracker.northM) + (tracker.axisHeightM ?? model.axisHeightM);
		const key = `${model.id}\n${postureKey(tracker.posture)}`;
		let group = groupIndex.get(key);
		if (group === undefined) {
			group = groups.length;
			groupIndex.set(key, group);
			groups.push(tableGroup(model, tracker.posture));
		}
		groupOf[i] = group;
	});
	const site = {
		groundAt: (eastM: number, northM: number) => groundHeightM(plot.ground, eastM, northM),
		treeYears,
		latitudeDeg: place.latitudeDeg
	};
	const solids = plot.obstacles.flatMap((obstacle, k) => obstacleSolids(obstacle, site, k));
	const horizons = terrainHorizons(plot.ground, east, north, up);
	return {
		place,
		plot,
		layout,
		treeYears,
		skyline: prepareSkyline(plot.skyline),
		models,
		horizons,
		engine: new ShadeEngine(east, north, up, groupOf, groups, solids, horizons)
	};
}

/** The same field with one tracker elsewhere; metres. Much cheaper than preparing it again, and leaves `field` as it is. */
export function moveTracker(field: Field, index: number, eastM: number, northM: number): Field {
	const { engine, plot, layout, models } = field;
	const east = engine.east.slice();
	const north = engine.north.slice();
	const up = engine.up.slice();
	const tracker = { ...layout.trackers[index], eastM, northM };
	east[index] = eastM;
	north[index] = northM;
	up[index] = groundHeightM(plot.ground, eastM, northM) + (tracker.axisHeightM ?? models[index].axisHeightM);
	const trackers = layout.trackers.slice();
	trackers[index] = tracker;
	const horizons = field.horizons?.moved(index, east, north, up) ?? null;
	return {
		...field,
		layout: { ...layout, trackers },
		horizons,
		engine: new ShadeEngine(east, north, up, engine.groupOf, engine.groups, engine.solids, horizons)
	};
}

/** True when the skyline or the horizon hides this apparent sun from the plot. */
export function fieldSunHidden(field: Field, sun: SunDirection): boolean {
	return sunHidden(field.skyline, sun.azimuthDeg, sun.elevationDeg);
}

/**
 * Shaded share of every table under one apparent sun, 0..1 in layout order; 1 where the front is not lit and
 * everywhere while the skyline or the horizon hides the sun. Exact (areas of polygons). Trees stand as on `dayOfYear`
 * (1..366) where it is given, else as on the day the engine was last turned to.
 */
export function fieldShade(field: Field, sun: SunDirection, dayOfYear?: number): Float64Array {
	const { engine } = field;
	if (dayOfYear !== undefined) engine.setDay(dayOfYear);
	const shares = new Float64Array(engine.count);
	if (fieldSunHidden(field, sun)) return shares.fill(1);
	engine.setSun(sun.azimuthDeg, sun.elevationDeg);
	engine.shares(shares);
	return shares;
}

/** Light that a crown must let through for the glass under it to be drawn as lit, and a sensor to count as lit. */
export const LIT_UNDER_CROWN = 0.5;

/**
 * The lit part of every table, for drawing: [tracker][piece] is a flat convex polygon [x0, y0, x1, y1, ..] in table
 * coordinates, x to the right seen facing the glass, y up the slope, metres from the middle. Glass under a crown
 * counts as lit when at least half of the beam passes.
 */
export function fieldLitPieces(field: Field, sun: SunDirection, dayOfYear?: number): number[][][] {
	const { engine } = field;
	if (dayOfYear !== undefined) engine.setDay(dayOfYear);
	if (fieldSunHidden(field, sun)) return Array.from({ length: engine.count }, () => []);
	engine.setSun(sun.azimuthDeg, sun.elevationDeg);
	return Array.from({ length: engine.count }, (_, i) => engine.litPolygons(i, LIT_UNDER_CROWN));
}

export interface TrackerPose {
	/** Middle of the glass, local frame, metres. */
	centre: [number, number, number];
	azimuthDeg: number;
	tiltDeg: number;
	/** Glass, metres. */
	widthM: number;
	heightM: number;
}

/** Where every table stands and points under one apparent sun, in layout order; at night they rest at night. */
export function trackerPoses(field: Field, sun: SunDirection): TrackerPose[] {
	const { engine, models } = field;
	engine.setSun(sun.azimuthDeg, sun.elevationDeg, false);
	return models.map((model, i) => {
		const pose = engine.poses[engine.groupOf[i]];
		return {
			centre: engine.centre(i),
			azimuthDeg: pose.azimuthDeg,
			tiltDeg: pose.tiltDeg,
			widthM: model.widthM,
			heightM: model.heightM
		};
	});
}
