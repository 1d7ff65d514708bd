import type { SkylinePoint } from './document';
import { prepareSkyline, sunHidden } from './geometry/skyline';
import { ShadeEngine } from './shade/engine';
import type { TableGroup } from './shade/table-group';
import { boxSolid, prismSolid } from './shade/prism-solids';
import type { Solid } from './shade/solid';
import type { SunDirection } from './conventions';

/** A rectangle of glass centred at a point, metres; normal at azimuth, tilt. */
export interface SceneTable {
	id: string;
	eastM: number;
	northM: number;
	upM: number;
	widthM: number;
	heightM: number;
	azimuthDeg: number;
	tiltDeg: number;
}

export interface SceneBox {
	kind: 'box';
	eastM: number;
	northM: number;
	baseM: number;
	/** Along east and north before a clockwise turn about the centre. */
	sizeXM: number;
	sizeYM: number;
	heightM: number;
	turnDeg: number;
}

export interface ScenePrism {
	kind: 'prism';
	/** Corner k stands at azimuth 360 k / sides from the centre. */
	sides: number;
	eastM: number;
	northM: number;
	baseM: number;
	bottomRadiusM: number;
	/** 0 is a cone. */
	topRadiusM: number;
	heightM: number;
}

export type SceneObstacle = SceneBox | ScenePrism;

export interface ShadeScene {
	sun: SunDirection;
	tables: SceneTable[];
	obstacles: SceneObstacle[];
	skyline: SkylinePoint[];
}

export interface SceneTableShade {
	id: string;
	/** 0..1; 1 where the front is not lit or the sun is hidden. */
	shadedShare: number;
	frontLit: boolean;
	hiddenBySkyline: boolean;
}

export function sceneSolid(obstacle: SceneObstacle, source: number): Solid {
	return obstacle.kind === 'box'
		? boxSolid(obstacle, obstacle.baseM, source)
		: prismSolid(obstacle, 0, source);
}

/** A table that stands still, with nothing but glass. */
export function fixedGroup(
	table: Pick<SceneTable, 'widthM' | 'heightM'>,
	pose: { azimuthDeg: number; tiltDeg: number }
): TableGroup {
	const fixed = { azimuthDeg: pose.azimuthDeg, tiltDeg: pose.tiltDeg, offset: [0, 0, 0] as const };
	return {
		halfWidth: table.widthM / 2,
		halfHeight: table.heightM / 2,
		steelHalfWidth: table.widthM / 2,
		steelHalfHeight: table.heightM / 2,
		halfGap: 0,
		offsetReach: 0,
		aimAt: () => fixed,
		poseAt: () => fixed
	};
}

/**
 * Shade of one scene: area of the union of the shadows, along the sun, of other tables and obstacles that stand
 * up-sun, clipped to each table, over its area. Good to 1e-9. The sun's direction is taken as given.
 */
export function shadeScene(scene: ShadeScene): SceneTableShade[] {
	const { sun, tables } = scene;
	const engine = new ShadeEngine(
		Float64Array.from(tables, (t) => t.eastM),
		Float64Array.from(tables, (t) => t.northM),
		Float64Array.from(tables, (t) => t.upM),
		Int32Array.from(tables, (_, i) => i),
		tables.map((t) => fixedGroup(t, t)),
		scene.obstacles.map(sceneSolid)
	);
	engine.setSun(sun.azimuthDeg, sun.elevationDeg);
	const hiddenBySkyline = sunHidden(prepareSkyline(scene.skyline), sun.azimuthDeg, sun.elevationDeg);
	return tables.map(({ id }, i) => ({
		id,
		shadedShare: hiddenBySkyline ? 1 : engine.share(i),
		frontLit: engine.cosine(i) > 0,
		hiddenBySkyline
	}));
}
