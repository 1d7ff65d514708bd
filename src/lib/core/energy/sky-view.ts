import type { SunDirection } from '../conventions';
import type { PreparedSkyline } from '../geometry/skyline';
import { sunHidden } from '../geometry/skyline';
import type { ShadeEngine } from '../shade/engine';
import type { SkyDirections } from './sky-directions';

/** Sun elevations at which the sky view is computed, degrees; linear between. The first is just above the horizon. */
const ELEVATIONS = [1e-6, 10, 20, 35, 50, 70, 90] as const;
const AZIMUTH_STEP_DEG = 15;
const AZIMUTHS = 360 / AZIMUTH_STEP_DEG;
export const SKY_NODES = ELEVATIONS.length * AZIMUTHS;

/** Up to four suns about a sun, with what each counts for. */
export interface SkyCorners {
	node: Int32Array;
	weight: Float64Array;
}

export const skyCorners = (): SkyCorners => ({ node: new Int32Array(4), weight: new Float64Array(4) });

/** The suns of the coarse grid about a sun and their weights, bilinear in azimuth and elevation. */
export function findCorners(azimuthDeg: number, elevationDeg: number, out: SkyCorners): void {
	const e = Math.min(90, Math.max(ELEVATIONS[0], elevationDeg));
	let row = 0;
	while (row < ELEVATIONS.length - 2 && e > ELEVATIONS[row + 1]) row++;
	const up = (e - ELEVATIONS[row]) / (ELEVATIONS[row + 1] - ELEVATIONS[row]);
	const a = azimuthDeg / AZIMUTH_STEP_DEG;
	const column = Math.floor(a);
	const right = a - column;
	const c0 = ((column % AZIMUTHS) + AZIMUTHS) % AZIMUTHS;
	const c1 = (c0 + 1) % AZIMUTHS;
	out.node[0] = row * AZIMUTHS + c0;
	out.node[1] = row * AZIMUTHS + c1;
	out.node[2] = out.node[0] + AZIMUTHS;
	out.node[3] = out.node[1] + AZIMUTHS;
	out.weight[0] = (1 - up) * (1 - right);
	out.weight[1] = (1 - up) * right;
	out.weight[2] = up * (1 - right);
	out.weight[3] = up * right;
}

/** Sun of a node of the grid. */
export function nodeSun(node: number): SunDirection {
	return {
		azimuthDeg: (node % AZIMUTHS) * AZIMUTH_STEP_DEG,
		elevationDeg: ELEVATIONS[Math.floor(node / AZIMUTHS)]
	};
}

/** What stands between tables and the sky while they look at one sun; shares of what each bare table would see. */
export interface SkyView {
	/** By table: share of its sky that neighbours, obstacles and near ground cover, weighted by cos of incidence. */
	lost: Float64Array;
	/** The same of the band at the horizon. */
	horizonLost: Float64Array;
	/** By group: share that the far skyline leaves. */
	open: Float64Array;
	horizonOpen: Float64Array;
}

/**
 * Sky views of tables `from` to `to` while all stand as for a sun. From each direction of the sky the exact shaded share of
 * each table is asked, as if the sun's light came from there, and summed with cos of incidence and solid angle. Divided by
 * the same sum for a bare table, so that a table alone has exactly (1 + cos tilt) / 2 times its share; error of the sum
 * over directions: `SKY_VIEW_ERROR`, or `SKY_VIEW_LEAST_ERROR` where that is more. What the tables in between shine back is neglected: dark glass returns some
 * percent of what it covers.
 */
export function skyView(
	engine: ShadeEngine,
	skyline: PreparedSkyline,
	directions: SkyDirections,
	sun: SunDirection,
	from: number,
	to: number,
	shares: Float64Array
): SkyView {
	const groups = engine.groups.length;
	const lost = new Float64Array(to - from);
	const horizonLost = new Float64Array(to - from);
	const open = new Float64Array(groups);
	const horizonOpen = new Float64Array(groups);
	const all = new Float64Array(groups);
	const horizonAll = new Float64Array(groups);
	const { groupOf } = engine;
	for (let d = 0; d < directions.count; d++) {
		const azimuthDeg = directions.azimuthDeg[d];
		const elevationDeg = directions.elevationDeg[d];
		const weight = directions.weight[d];
		const low = directions.lowest[d] === 1;
		const hidden = sunHidden(skyline, azimuthDeg, elevationDeg);
		engine.setLight(sun.azimuthDeg, sun.elevationDeg, azimuthDeg, elevationDeg, !hidden);
		let faced = false;
		for (let g = 0; g < groups; g++) {
			const seen = weight * Math.max(0, engine.poses[g].cosine);
			if (seen > 0) faced = true;
			all[g] += seen;
			if (low) horizonAll[g] += seen;
			if (hidden) continue;
			open[g] += seen;
			if (low) horizonOpen[g] += seen;
		}
		if (hidden || !faced || engine.shares(shares, from, to) === 0) continue;
		for (let i = from; i < to; i++) {
			if (shares[i] === 0) continue;
			const cosine = engine.poses[groupOf[i]].cosine;
			if (cosine <= 0) continue;
			const covered = weight * cosine * shares[i];
			lost[i - from] += covered;
			if (low) horizonLost[i - from] += covered;
		}
	}
	for (let i = from; i < to; i++) {
		const g = groupOf[i];
		lost[i - from] = all[g] > 0 ? lost[i - from] / all[g] : 0;
		horizonLost[i - from] = horizonAll[g] > 0 ? horizonLost[i - from] / horizonAll[g] : 0;
	}
	for (let g = 0; g < groups; g++) {
		open[g] = all[g] > 0 ? open[g] / all[g] : 1;
		horizonOpen[g] = horizonAll[g] > 0 ? horizonOpen[g] / horizonAll[g] : 1;
	}
	return { lost, horizonLost, open, horizonOpen };
}
