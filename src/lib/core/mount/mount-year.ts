import { sunVector } from '../conventions';
import type { Mount, MountEdge } from '../document';
import { dayOfYear } from '../energy/extraterrestrial';
import { fieldSunHidden, LIT_UNDER_CROWN, prepareField, type Field } from '../field';
import type { MountClass, MountPlaceResult, MountResult, RunInput, TrackerMounts } from '../results';
import { assertStep, SunSky, type SunStep } from '../run/sun-steps';
import type { ShadeEngine } from '../shade/engine';
import { insideConvex } from '../shade/pieces';
import { CORE_VERSION } from '../version';
import { chooseCommon, comparePlaces } from './choose';
import { classifyMount } from './classes';
import { MOUNT_EDGES, mountPlaces, mountPoint, markShaded, type MountPlaces } from './places';
import { rayMeetsSolid, rayMeetsTable, type RayTable } from './ray';
import { MountTally } from './tally';

export interface MountOptions {
	/** Between candidates along an edge, metres; 0.2 unless given. */
	spacingM?: number;
	/** Outside the glass, metres; 0.08 unless given, and never inside the frame's outer edge. */
	outM?: number;
	/** In front of the glass, metres; 0.03 unless given. */
	forwardM?: number;
}

const DAY_MS = 86400000;
/** Nearer to edge-on than this the heads are asked one by one with rays. */
const EDGE_ON = 1e-3;
/** One step in so many is looked at to name who blocks a place most. */
const BLAME_EVERY = 3;

/**
 * True when neighbours cannot shade a top edge: every table alike and following on level ground with no obstacle.
 * Then a neighbour's shadow always comes up from below.
 */
export function levelGroundTruth(field: Field): boolean {
	const { layout, plot, models } = field;
	const { ground } = plot;
	if (ground.kind !== 'level' && (ground.kind !== 'plane' || ground.risePercent !== 0)) return false;
	if (plot.obstacles.length > 0) return false;
	const shape = (i: number): string => {
		const m = models[i];
		return JSON.stringify([
			m.widthM,
			m.heightM,
			m.frameMarginM,
			m.tiltAxisOffsetM,
			m.tableOffsetM,
			m.centreShiftM,
			m.minTiltDeg,
			m.maxTiltDeg,
			m.stops,
			layout.trackers[i].axisHeightM ?? m.axisHeightM
		]);
	};
	return layout.trackers.every(
		(tracker, i) => tracker.posture.kind === 'following' && (i === 0 || shape(i) === shape(0))
	);
}

/** All steps of the year with the sun above horizon and skyline. */
function sunSteps(
	input: RunInput,
	field: Field
): (SunStep & { index: number; day: number; month: number })[] {
	const sky = new SunSky(input.place);
	const offsetMs = input.utcOffsetMinutes * 60000;
	const stepMs = input.stepMinutes * 60000;
	const startMs = Date.UTC(input.year, 0, 1) - offsetMs;
	const endMs = Date.UTC(input.year + 1, 0, 1) - offsetMs;
	const steps = [];
	let index = 0;
	for (let timeMs = startMs + stepMs / 2; timeMs < endMs; timeMs += stepMs, index++) {
		const sun = sky.at(timeMs);
		if (sun.elevationDeg <= 0 || fieldSunHidden(field, sun)) continue;
		const localMs = timeMs + offsetMs;
		steps.push({
			...sun,
			index,
			day: Math.floor(localMs / DAY_MS),
			month: new Date(localMs).getUTCMonth()
		});
	}
	return steps;
}

/** Marks the shaded places of table i, whose neighbours have been collected; true when any is shaded. */
function markPlaces(
	engine: ShadeEngine,
	i: number,
	places: MountPlaces,
	marks: Uint8Array,
	sun: SunStep
): boolean {
	// Near ground hides the light from a machine as a whole, by the middle of its table.
	if (engine.hidden(i)) {
		marks.fill(1);
		return true;
	}
	marks.fill(0);
	let any = false;
	if (Math.abs(engine.cosine(i)) > EDGE_ON) {
		engine.shadowsAhead(i, places.forwardM, (shadow, corners, passes) => {
			if (passes >= LIT_UNDER_CROWN) return;
			markShaded(places, shadow, corners, marks);
			any = true;
		});
		if (engine.cosine(i) > 0) return any;
	}
	// The own table stands in the way too, or the plane is edge-on: rays, head by head.
	const s = sunVector(sun.azimuthDeg, sun.elevationDeg);
	const pose = engine.poses[engine.groupOf[i]];
	const centre = engine.centre(i);
	const own = rayTable(engine, i);
	const others = engine.collectedTables().map((j) => rayTable(engine, j));
	const solids = engine.collectedSolids(LIT_UNDER_CROWN);
	for (let k = 0; k < marks.length; k++) {
		const p = [0, 1, 2].map(
			(c) => centre[c] + places.xs[k] * pose.u[c] + places.ys[k] * pose.v[c] + places.forwardM * pose.n[c]
		);
		const shaded =
			rayMeetsTable(p, s, own) ||
			others.some((table) => rayMeetsTable(p, s, table)) ||
			solids.some((solid) => rayMeetsSolid(p, s, solid));
		if (shaded) {
			marks[k] = 1;
			any = true;
		}
	}
	return any;
}

function rayTable(engine: ShadeEngine, j: number): RayTable {
	const group = engine.groups[engine.groupOf[j]];
	const { u, v, n } = engine.poses[engine.groupOf[j]];
	return {
		centre: engine.centre(j),
		u,
		v,
		n,
		halfWidth: group.steelHalfWidth,
		halfHeight: group.steelHalfHeight,
		halfGap: group.halfGap
	};
}

/**
 * The year of a sun sensor at every candidate mount of every tracker: along all four edges, evenly from the middle.
 * A head is a point; it is shaded when the ray to the apparent sun meets another table from either side, its own
 * table, an obstacle, or a tree's crown that passes less than half of the beam. Steps with the sun below horizon or
 * skyline count for nothing. Times are multiples of the step. The sensor's field of view, the sun's blur, dawn
 * postures and stuck neighbours are not modelled.
 *
 * `onProgress` hears the part done, 0..1; when it answers false the run stops and the result is null.
 */
export function mountYear(
	input: RunInput,
	options: MountOptions = {},
	onProgress?: (done01: number) => boolean
): MountResult | null {
	assertStep(input.stepMinutes);
	const field = prepareField(input);
	const { engine, models } = field;
	const chosen = {
		spacingM: options.spacingM ?? 0.2,
		outM: options.outM ?? 0.08,
		forwardM: options.forwardM ?? 0.03
	};
	const placesOf = new Map(input.layout.models.map((model) => [model.id, mountPlaces(model, chosen)]));
	const tallies = models.map((model) => new MountTally(placesOf.get(model.id) ?? mountPlaces(model, chosen)));
	const most = tallies.reduce((m, t) => Math.max(m, t.places.mounts.length), 0);
	const marks = new Uint8Array(most);
	const steps = sunSteps(input, field);
	const every = Math.max(1, Math.floor(steps.length / 100));

	for (let s = 0; s < steps.length; s++) {
		if (onProgress && s % every === 0 && onProgress((0.9 * s) / steps.length) === false) return null;
		const sun = steps[s];
		const last = s > 0 ? steps[s - 1] : null;
		const newDay = last !== null && last.day !== sun.day;
		const gap = last !== null && last.index !== sun.index - 1;
		if (last === null || newDay) engine.setDay(dayOfYear(sun.day * DAY_MS));
		engine.setSun(sun.azimuthDeg, sun.elevationDeg);
		for (let i = 0; i < tallies.length; i++) {
			const tally = tallies[i];
			if (newDay) tally.endDay();
			else if (gap) tally.breakRuns();
			const facing = engine.cosine(i) > 0;
			const { places } = tally;
			const found = engine.collect(i, places.outM + Math.abs(places.forwardM));
			if (found === 0 && engine.cosine(i) > EDGE_ON && !engine.hidden(i)) {
				tally.clearStep(true);
				continue;
			}
			const share = engine.shareOfCollected(i);
			const own = marks.subarray(0, places.mounts.length);
			const any = markPlaces(engine, i, places, own, sun);
			if (any) tally.step(own, sun.elevationDeg, sun.month, sun.day, share, facing);
			else tally.clearStep(facing && share < 0.999);
		}
	}
	for (const tally of tallies) tally.endDay();

	const results = tallies.map((tally) =>
		tally.places.mounts.map((_, k) => tally.result(k, input.stepMinutes))
	);
	return summarise(input, field, tallies, results, steps, onProgress);
}

const placeKey = (mount: Mount): string => `${mount.edge} ${mount.alongM}`;

function summarise(
	input: RunInput,
	field: Field,
	tallies: readonly MountTally[],
	results: readonly MountPlaceResult[][],
	steps: readonly (SunStep & { day: number })[],
	onProgress?: (done01: number) => boolean
): MountResult | null {
	const { trackers } = input.layout;
	const fallback: Mount = { edge: 'top', alongM: 0, outM: 0.08, forwardM: 0.03 };
	// The common place must exist on every model in use.
	const keyed = results.map((own) => new Map(own.map((result) => [placeKey(result.mount), result])));
	const shared = [...(keyed[0]?.keys() ?? [])].filter((key) => keyed.every((own) => own.has(key)));
	const columns = keyed.map((own) => shared.map((key) => own.get(key) as MountPlaceResult));
	const commonIndex = chooseCommon(columns);
	const common = columns[0]?.[commonIndex]?.mount ?? fallback;

	const best = results.map((own) => own.reduce((a, b) => (comparePlaces(b, a) < 0 ? b : a)));
	const wanted: { tracker: number; mount: Mount }[] = [];
	trackers.forEach((_, i) => {
		for (const result of [columns[i][commonIndex], best[i]]) {
			if (result.shadedHours > 0) wanted.push({ tracker: i, mount: result.mount });
		}
	});
	const blame = nameBlockers(field, wanted, steps);
	if (onProgress && onProgress(1) === false) return null;
	const reasonFor = (i: number, result: MountPlaceResult) =>
		classifyMount(result, blame.get(`${i} ${placeKey(result.mount)}`) ?? null);

	const counts: Record<MountClass, number> = { clear: 0, sound: 0, watch: 0, unfit: 0 };
	const exceptions: MountResult['exceptions'] = [];
	const list = trackers.map((tracker, i): TrackerMounts => {
		const own = columns[i][commonIndex];
		const commonClass = reasonFor(i, own);
		const bestClass = reasonFor(i, best[i]);
		counts[commonClass.class]++;
		if (commonClass.class === 'watch' || commonClass.class === 'unfit') {
			exceptions.push({
				trackerId: tracker.id,
				tag: tracker.tag,
				mount: best[i].mount,
				...bestClass
			});
		}
		const edges = {} as Record<MountEdge, MountPlaceResult[]>;
		for (const edge of MOUNT_EDGES) {
			const { first, count } = tallies[i].places.edges[edge];
			edges[edge] = results[i].slice(first, first + count);
		}
		return {
			trackerId: tracker.id,
			tag: tracker.tag,
			edges,
			best: best[i],
			bestClass: bestClass.class,
			bestReason: bestClass.reason,
			common: own,
			commonClass: commonClass.class,
			commonReason: commonClass.reason
		};
	});
	return {
		coreVersion: CORE_VERSION,
		levelGroundTruth: levelGroundTruth(field),
		common,
		commonClassCounts: counts,
		commonServesShare: trackers.length > 0 ? (counts.clear + counts.sound) / trackers.length : 0,
		exceptions,
		trackers: list
	};
}

/** Who blocks each wanted place most, over a sample of the year: a tag or an obstacle's name. */
function nameBlockers(
	field: Field,
	wanted: readonly { tracker: number; mount: Mount }[],
	steps: readonly (SunStep & { day: number })[]
): Map<string, string> {
	const named = new Map<string, string>();
	if (wanted.length === 0) return named;
	const { engine, layout, plot, models } = field;
	const counts = wanted.map(() => new Map<number, number>());
	const heads = wanted.map(({ tracker, mount }) => mountPoint(models[tracker], mount));
	for (let s = 0; s < steps.length; s += BLAME_EVERY) {
		engine.setDay(dayOfYear(steps[s].day * DAY_MS));
		engine.setSun(steps[s].azimuthDeg, steps[s].elevationDeg);
		wanted.forEach(({ tracker: i, mount }, w) => {
			if (engine.cosine(i) <= EDGE_ON) return;
			if (engine.collect(i, mount.outM + Math.abs(mount.forwardM)) === 0) return;
			const { xM, yM, zM } = heads[w];
			engine.shadowsAhead(i, zM, (shadow, corners, passes, by) => {
				if (passes >= LIT_UNDER_CROWN || !insideConvex(shadow, corners, xM, yM)) return;
				counts[w].set(by, (counts[w].get(by) ?? 0) + 1);
			});
		});
	}
	wanted.forEach(({ tracker, mount }, w) => {
		let most = 0;
		for (const [by, count] of counts[w]) {
			if (count <= most) continue;
			most = count;
			const name = by >= 0 ? layout.trackers[by].tag : plot.obstacles[-1 - by].name;
			named.set(`${tracker} ${placeKey(mount)}`, name);
		}
	});
	return named;
}
