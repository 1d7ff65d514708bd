import { clearBeam, SOLAR_CONSTANT } from '../energy/beam';
import { followAim } from '../machine/aim';
import { centreOffset } from '../machine/pose';
import type { TrackerModel } from '../document';
import { ShadeEngine } from '../shade/engine';
import { insideConvex } from '../shade/pieces';
import { assertStep } from './sun-steps';
import { tableGroup } from '../field';
import { positionFromPlace } from '../sun/position';
import { SunSeries } from '../sun/series';

export interface FieldLossRequest {
	latitudeDeg: number;
	longitudeDeg: number;
	year: number;
	/** Mid-interval steps, minutes. */
	stepMinutes: number;
	/** False uses the airless sun; default true. */
	refraction?: boolean;
	/** `meinel`: 1361 x 0.7^(AM^0.678). `clear` (default): the pages' own beam at `altitudeM`, sun's distance by date. */
	beam?: 'meinel' | 'clear';
	altitudeM?: number;
	/** A table that follows without limits unless the model says otherwise. */
	model: Pick<TrackerModel, 'widthM' | 'heightM'> & Partial<TrackerModel>;
	/** Tilt axis of each tracker, metres. */
	trackers: { id: string; eastM: number; northM: number; upM: number }[];
	/** Trackers to answer for; all when left out. The others still shade. */
	only?: string[];
	/** Points of each answered table whose shaded share of daylight is asked: x right, y up from its middle, metres. */
	points?: { xM: number; yM: number }[];
}

export interface FieldLossResult {
	daylightH: number;
	trackers: {
		id: string;
		beamLoss: number;
		meanShadedShare: number;
		anyShadeShareOfDaylight: number;
		points?: { xM: number; yM: number; shadedShareOfDaylight: number }[];
	}[];
}

/** Plain machine under the fields that a request leaves out: axes in one point, no frame margin, no limits. */
function wholeModel(model: FieldLossRequest['model']): TrackerModel {
	return {
		id: 'request',
		name: 'request',
		frameMarginM: 0,
		centreGapM: 0,
		axisHeightM: 0,
		tiltAxisOffsetM: 0,
		tableOffsetM: 0,
		centreShiftM: 0,
		minTiltDeg: 0,
		maxTiltDeg: 90,
		stops: null,
		night: { azimuthDeg: null, tiltDeg: 0 },
		windTiltDeg: 0,
		slewDegPerS: 1,
		sensorHeadRadiusM: 0,
		sensorViewDeg: 85,
		sensorLeadM: 0,
		moduleColumns: 1,
		moduleRows: 1,
		powerW: 0,
		...model
	};
}

/**
 * Beam lost to neighbours over one UTC year in a field of equal followers without obstacles. With `refraction` false
 * and beam `meinel` it is the plain textbook sum: steps at mid-interval, airless elevation above 0, 1361 W/m².
 */
export function fieldLoss(request: FieldLossRequest): FieldLossResult {
	assertStep(request.stepMinutes);
	const model = wholeModel(request.model);
	const { trackers } = request;
	const group = tableGroup(model, { kind: 'following' });
	const engine = new ShadeEngine(
		Float64Array.from(trackers, (t) => t.eastM),
		Float64Array.from(trackers, (t) => t.northM),
		Float64Array.from(trackers, (t) => t.upM),
		new Int32Array(trackers.length),
		[
			{
				...group,
				aimAt: (azimuthDeg, elevationDeg) => followAim(model, { azimuthDeg, elevationDeg }),
				poseAt(azimuthDeg, elevationDeg) {
					const aim = followAim(model, { azimuthDeg, elevationDeg });
					return { ...aim, offset: centreOffset(model, aim) };
				}
			}
		],
		[]
	);
	const wanted = request.only ? new Set(request.only) : null;
	const asked = trackers.map((_, i) => i).filter((i) => wanted === null || wanted.has(trackers[i].id));
	const points = request.points ?? [];
	const without = new Float64Array(trackers.length);
	const lit = new Float64Array(trackers.length);
	const shares = new Float64Array(trackers.length);
	const any = new Float64Array(trackers.length);
	const pointSteps = new Float64Array(trackers.length * points.length);
	const series = new SunSeries();
	const stepMs = request.stepMinutes * 60000;
	const endMs = Date.UTC(request.year + 1, 0, 1);
	let daylight = 0;
	for (let timeMs = Date.UTC(request.year, 0, 1) + stepMs / 2; timeMs < endMs; timeMs += stepMs) {
		const place = series.placeAt(timeMs);
		const sun = positionFromPlace(place, request.latitudeDeg, request.longitudeDeg);
		const elevation = request.refraction === false ? sun.elevationDeg : sun.apparentElevationDeg;
		if (elevation <= 0) continue;
		daylight++;
		const beam =
			request.beam === 'meinel'
				? clearBeam(elevation)
				: clearBeam(elevation, request.altitudeM ?? 0, SOLAR_CONSTANT / place.distanceAu ** 2);
		engine.setSun(sun.azimuthDeg, elevation, asked.length > 8);
		for (const i of asked) {
			const cosine = engine.cosine(i);
			if (cosine <= 0) continue;
			const share = engine.collect(i) === 0 ? 0 : engine.shareOfCollected(i);
			without[i] += beam * cosine;
			lit[i] += beam * cosine * (1 - share);
			shares[i] += share;
			if (share > 1e-9) any[i]++;
			if (share > 0 && points.length > 0) {
				const hit = new Uint8Array(points.length);
				engine.shadowsAhead(i, 0, (shadow, corners) => {
					points.forEach((p, k) => {
						if (!hit[k] && insideConvex(shadow, corners, p.xM, p.yM)) hit[k] = 1;
					});
				});
				hit.forEach((shaded, k) => (pointSteps[i * points.length + k] += shaded));
			}
		}
	}
	return {
		daylightH: (daylight * request.stepMinutes) / 60,
		trackers: asked.map((i) => ({
			id: trackers[i].id,
			beamLoss: without[i] > 0 ? 1 - lit[i] / without[i] : 0,
			meanShadedShare: daylight > 0 ? shares[i] / daylight : 0,
			anyShadeShareOfDaylight: daylight > 0 ? any[i] / daylight : 0,
			...(points.length > 0 && {
				points: points.map((p, k) => ({
					...p,
					shadedShareOfDaylight: daylight > 0 ? pointSteps[i * points.length + k] / daylight : 0
				}))
			})
		}))
	};
}
