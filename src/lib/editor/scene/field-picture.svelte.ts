import { getContext, setContext } from 'svelte';
import {
	fieldLitPieces,
	groundHeightM,
	reachRadiusM,
	sunVector,
	tableAxes,
	trackerPoses,
	type Finding,
	type PlanPoint,
	type Vec3
} from '$lib/core';
import { castOutline, groundPlanes, obstacleParts } from '../kernels/ground-shadow';
import type { TableQuad } from '../kernels/ray-pick';
import { setBackLine } from '../kernels/set-back-line';
import type { ProjectStore } from '../project-store.svelte';

const contactKinds: Finding['kind'][] = ['circles-overlap', 'set-back', 'outside', 'meets-obstacle'];
/** Below this the sun throws shadows too long to mean anything to the eye. */
const leastSunDeg = 0.5;

function along(table: TableQuad, x: number, y: number): Vec3 {
	return [
		table.centre[0] + x * table.u[0] + y * table.v[0],
		table.centre[1] + x * table.u[1] + y * table.v[1],
		table.centre[2] + x * table.u[2] + y * table.v[2]
	];
}

/** Corners of a table in space, from the lower left, seen facing the glass, all round. */
export function tableCorners(table: TableQuad): Vec3[] {
	const x = table.widthM / 2;
	const y = table.heightM / 2;
	return [along(table, -x, -y), along(table, x, -y), along(table, x, y), along(table, -x, y)];
}

/** A flat polygon of the table's own plane (x right, y up the slope) as points in space. */
export function inSpace(table: TableQuad, flat: readonly number[]): Vec3[] {
	const points: Vec3[] = [];
	for (let i = 0; i + 1 < flat.length; i += 2) points.push(along(table, flat[i], flat[i + 1]));
	return points;
}

/** What every view draws, worked out once from the documents and the moment. By tracker means in layout order. */
export class FieldPicture {
	readonly store: ProjectStore;
	constructor(store: ProjectStore) {
		this.store = store;
	}

	readonly sunUp = $derived.by(() => this.store.sun.elevationDeg > leastSunDeg);
	readonly sunVector = $derived.by(() => sunVector(this.store.sun.azimuthDeg, this.store.sun.elevationDeg));

	readonly tables = $derived.by((): TableQuad[] =>
		trackerPoses(this.store.field, this.store.sun).map((pose) => ({
			centre: pose.centre,
			...tableAxes(pose.azimuthDeg, pose.tiltDeg),
			widthM: pose.widthM,
			heightM: pose.heightM
		}))
	);

	/** Lit polygons of each table's plane; no polygon at all on a table that is wholly shaded. */
	readonly litPieces = $derived.by(() =>
		fieldLitPieces(this.store.field, this.store.sun, this.store.dayOfYear)
	);

	/** Outlines of the tables' shadows on the ground, null where none falls. */
	readonly tableShadows = $derived.by((): (PlanPoint[] | null)[] =>
		this.sunUp
			? this.tables.map((table) => castOutline(tableCorners(table), this.sunVector, this.planeAt))
			: this.tables.map(() => null)
	);

	readonly obstacleShadows = $derived.by((): PlanPoint[][] => {
		if (!this.sunUp) return [];
		return this.store.plot.obstacles.flatMap((obstacle) =>
			obstacleParts(obstacle, this.store.plot.ground)
				.map((part) => castOutline(part, this.sunVector, this.planeAt))
				.filter((outline) => outline !== null)
		);
	});

	readonly #reachByModel = $derived.by(
		() => new Map(this.store.layout.models.map((model) => [model.id, reachRadiusM(model)]))
	);

	/** Radius of each tracker's reach circle, metres. */
	readonly reachM = $derived.by(() =>
		this.store.layout.trackers.map(({ modelId }) => this.#reachByModel.get(modelId) ?? 0)
	);

	/** Ids of trackers whose circle touches another, the set-back or the land beyond. */
	readonly contactIds = $derived.by(
		() =>
			new Set(
				this.store.findings
					.filter(({ kind }) => contactKinds.includes(kind))
					.flatMap(({ trackerIds }) => trackerIds)
			)
	);

	readonly setBackSegments = $derived.by(() =>
		this.store.plot.boundary.flatMap((part) => setBackLine(part, this.store.plot.setBackM))
	);

	/** The plane that the ground is near a point. */
	readonly planeAt = $derived.by(() => groundPlanes(this.store.plot.ground));

	upM(point: PlanPoint): number {
		return groundHeightM(this.store.plot.ground, point[0], point[1]);
	}
}

const contextKey = Symbol('field-picture');

export function setFieldPicture(picture: FieldPicture): FieldPicture {
	return setContext(contextKey, picture);
}

export function getFieldPicture(): FieldPicture {
	return getContext<FieldPicture>(contextKey);
}
