import { MEAN_DAYS } from '../energy/average-year';
import { ProtectedGroups } from '../energy/protected-groups';
import { skyDirections } from '../energy/sky-directions';
import { splitSky, type SkySplit } from '../energy/sky-split';
import { findCorners, nodeSun, skyCorners, skyView, SKY_NODES, type SkyView } from '../energy/sky-view';
import { stringLoss } from '../energy/string-effect';
import { fieldSunHidden, prepareField, type Field } from '../field';
import type { EnergyResult, EnergySkyModel, RunInput } from '../results';
import { passesOn } from '../shade/solid';
import { joinEnergyYear } from './energy-join';
import { BINS, emptyPart, PARTS, type EnergyPart, type TrackerRange } from './energy-part';
import { energySteps, type EnergySteps } from './energy-steps';
import { otherSkyModel } from './energy-words';
import { assertStep } from './sun-steps';
import { AlikeView } from '../shade/alike-view';

/** Tables count as turned away from the sun below this cosine. */
const LEAST_COSINE = 1e-6;
/** Part of the work that the sky views are, for telling the progress. */
const VIEWS_01 = 0.4;

/**
 * Light on every table of a field over a year and what takes it away. Steps of `stepMinutes` at mid-interval; beam x lit
 * share x cos of incidence; circumsolar light shaded as the beam; isotropic light by the sky that neighbours, obstacles and
 * near ground leave (`skyView`); what the ground sends back as from open, unshaded ground; the string effect of
 * Martinez-Moreno, Munoz and Lorenzo 2010 on beam and circumsolar light, between the shaded area and the worst wiring.
 * The far skyline takes its light from both sides of every loss. kWh/m² of glass; losses are shares of all the light
 * that would come without shade.
 *
 * `onProgress` hears the part done, 0..1; when it answers false the run stops and the result is null. Throws without
 * `input.energy` and on settings that `checkEnergy` refuses. The same inputs give the same result.
 */
export function energyYear(input: RunInput, onProgress?: (done01: number) => boolean): EnergyResult | null {
	const part = energyYearPart(input, onProgress);
	return part && joinEnergyYear(input, [part]);
}

/**
 * The trackers `from` to `to` (not itself) of an energy year, for a thread of its own; all others still shade them. Parts
 * that follow each other are put together by `joinEnergyYear`: one or many give the same result, byte for byte.
 */
export function energyYearPart(
	input: RunInput,
	onProgress?: (done01: number) => boolean,
	range?: TrackerRange
): EnergyPart | null {
	assertStep(input.stepMinutes);
	const settings = input.energy;
	if (!settings) throw new Error('An energy year needs its settings');
	const field = prepareField(input);
	const { engine } = field;
	const from = range?.from ?? 0;
	const to = range?.to ?? engine.count;
	if (!(from >= 0 && from <= to && to <= engine.count)) {
		throw new RangeError(`Energy year: trackers ${from} to ${to} of ${engine.count}`);
	}
	const steps = energySteps(input);
	const shares = new Float64Array(engine.count);
	const views = skyViews(field, steps, from, to, shares, (done) => onProgress?.(done * VIEWS_01) !== false);
	if (!views) return null;
	const part = emptyPart(from, to, engine.groups.length, engine.groupOf, steps);
	const year = new YearSums(field, input, steps, views, part, shares);
	const every = Math.max(1, Math.floor(steps.count / 60));
	for (let s = 0; s < steps.count; s++) {
		if (onProgress && s % every === 0) {
			if (onProgress(VIEWS_01 + ((1 - VIEWS_01) * s) / steps.count) === false) return null;
		}
		year.add(s);
	}
	onProgress?.(1);
	return part;
}

/** Sky views of all nodes that a year's suns come near, by state of the leaves. */
interface SkyViews {
	/** State of the leaves in each month. */
	stateOf: Int32Array;
	/** [state * SKY_NODES + node] */
	views: (SkyView | undefined)[];
}

function skyViews(
	field: Field,
	steps: EnergySteps,
	from: number,
	to: number,
	shares: Float64Array,
	goOn: (done01: number) => boolean
): SkyViews | null {
	const { engine, skyline } = field;
	const keys: string[] = [];
	const days: number[] = [];
	// Leaves come and go by the day; the sky view takes each month as on its mean day.
	const stateOf = Int32Array.from(MEAN_DAYS, (day) => {
		const key = engine.solids.map((solid) => passesOn(solid, day)).join(' ');
		const known = keys.indexOf(key);
		if (known >= 0) return known;
		keys.push(key);
		days.push(day);
		return keys.length - 1;
	});
	const wanted = new Uint8Array(keys.length * SKY_NODES);
	const corners = skyCorners();
	for (let s = 0; s < steps.count; s++) {
		findCorners(steps.azimuthDeg[s], steps.elevationDeg[s], corners);
		const base = stateOf[steps.month[s]] * SKY_NODES;
		for (let c = 0; c < 4; c++) if (corners.weight[c] > 0) wanted[base + corners.node[c]] = 1;
	}
	const total = wanted.reduce((sum, one) => sum + one, 0);
	const views: (SkyView | undefined)[] = [];
	const directions = skyDirections();
	let done = 0;
	for (let k = 0; k < wanted.length; k++) {
		if (wanted[k] === 0) continue;
		if (!goOn(done++ / total)) return null;
		engine.setDay(days[Math.floor(k / SKY_NODES)]);
		views[k] = skyView(engine, skyline, directions, nodeSun(k % SKY_NODES), from, to, shares);
	}
	return { stateOf, views };
}

/** Adds the steps of a year up, for one range of trackers. */
class YearSums {
	private readonly corners = skyCorners();
	private readonly split: SkySplit = { circumsolar: 0, isotropic: 0, horizon: 0 };
	private readonly otherSplit: SkySplit = { circumsolar: 0, isotropic: 0, horizon: 0 };
	private readonly model: EnergySkyModel;
	private readonly other: EnergySkyModel;
	private readonly albedo: readonly number[];
	/** Cell groups by tracker; trackers of one model share a counter. */
	private readonly groupsOf: ProtectedGroups[];
	// Of each group of tables at the present step, kWh/m².
	private readonly beam: Float64Array;
	private readonly circumsolar: Float64Array;
	private readonly isotropic: Float64Array;
	private readonly horizon: Float64Array;
	private readonly otherCircumsolar: Float64Array;
	private readonly otherIsotropic: Float64Array;
	private readonly otherHorizon: Float64Array;
	private current: ProtectedGroups;
	// First places of the present step's month and hour in lists by bin and tracker.
	private month = 0;
	private hour = 0;
	/** Where all tables are alike and nothing else shades: their shadows are rectangles, had with the shares. */
	private readonly alike: AlikeView | null;
	private readonly visit = (shadow: Float64Array, corners: number): void => this.current.add(shadow, corners);
	private readonly visitAlike: (i: number, hits: number) => void;

	constructor(
		private readonly field: Field,
		input: RunInput,
		private readonly steps: EnergySteps,
		private readonly sky: SkyViews,
		private readonly part: EnergyPart,
		private readonly shares: Float64Array
	) {
		const settings = input.energy!;
		const groups = field.engine.groups.length;
		this.model = settings.skyModel;
		this.other = otherSkyModel(settings.skyModel);
		const { albedo } = settings;
		this.albedo = typeof albedo === 'number' ? Array<number>(12).fill(albedo) : albedo;
		const counters = new Map(input.layout.models.map((model) => [model, new ProtectedGroups(model)]));
		this.groupsOf = field.models.map((model) => {
			const counter = counters.get(model) ?? new ProtectedGroups(model);
			counters.set(model, counter);
			return counter;
		});
		this.current = this.groupsOf[0];
		const { engine } = field;
		const [group] = engine.groups;
		const plain =
			groups === 1 && group.halfGap === 0 && engine.solids.length === 0 && engine.horizons === null;
		this.alike = plain ? new AlikeView(engine, group) : null;
		const union = this.alike?.union;
		this.visitAlike = (i, hits) => {
			if (!union) return;
			const { x, y } = union;
			const { steelHalfWidth: w, steelHalfHeight: h } = group;
			const counted = this.groupsOf[i];
			counted.clear();
			for (let k = 0; k < hits; k++) counted.addRect(x[k] - w, x[k] + w, y[k] - h, y[k] + h);
			this.take(i, shares[i], counted);
		};
		this.beam = new Float64Array(groups);
		this.circumsolar = new Float64Array(groups);
		this.isotropic = new Float64Array(groups);
		this.horizon = new Float64Array(groups);
		this.otherCircumsolar = new Float64Array(groups);
		this.otherIsotropic = new Float64Array(groups);
		this.otherHorizon = new Float64Array(groups);
	}

	add(s: number): void {
		const { field, steps } = this;
		const sun = { azimuthDeg: steps.azimuthDeg[s], elevationDeg: steps.elevationDeg[s] };
		const hidden = fieldSunHidden(field, sun);
		const { azimuthDeg, elevationDeg } = sun;
		// Alike tables are looked up by the view that sums them.
		const indexed = this.alike ? null : !hidden;
		field.engine.setLight(azimuthDeg, elevationDeg, azimuthDeg, elevationDeg, indexed);
		this.sumWithout(s, elevationDeg, hidden);
		this.takeSky(s);
		if (!hidden) this.takeShade(s);
	}

	/** Light on bare tables of each group at a step. */
	private sumWithout(s: number, elevationDeg: number, hidden: boolean): void {
		const { steps, part, corners, split, otherSplit, sky } = this;
		const { poses } = this.field.engine;
		const zenithDeg = Math.min(90, 90 - elevationDeg);
		const dni = steps.directNormal[s];
		const dhi = steps.diffuse[s];
		const outside = steps.extraterrestrial[s];
		splitSky(this.model, zenithDeg, dni, dhi, outside, split);
		splitSky(this.other, zenithDeg, dni, dhi, outside, otherSplit);
		findCorners(steps.azimuthDeg[s], elevationDeg, corners);
		const base = sky.stateOf[steps.month[s]] * SKY_NODES;
		const kwh = steps.hours[s] / 1000;
		const month = steps.month[s];
		const hour = 12 + steps.hour[s];
		// A sun behind the skyline sends no beam to the ground of the plot either.
		const level = hidden ? dhi : steps.global[s];
		for (let g = 0; g < poses.length; g++) {
			const { n, cosine } = poses[g];
			const cosTilt = n[2];
			const sinTilt = Math.hypot(n[0], n[1]);
			const view = (1 + cosTilt) / 2;
			const facing = hidden ? 0 : Math.max(0, cosine);
			let open = 0;
			let horizonOpen = 0;
			for (let c = 0; c < 4; c++) {
				if (corners.weight[c] === 0) continue;
				const node = sky.views[base + corners.node[c]]!;
				open += corners.weight[c] * node.open[g];
				horizonOpen += corners.weight[c] * node.horizonOpen[g];
			}
			const beam = dni * facing * kwh;
			const circumsolar = split.circumsolar * facing * kwh;
			const ground = level * this.albedo[month] * ((1 - cosTilt) / 2) * kwh;
			// What each group gets before the skyline takes its part, kept for the neighbours' part.
			const isotropic = (this.isotropic[g] = split.isotropic * view * kwh);
			const horizon = (this.horizon[g] = bandOf(split, sinTilt, facing, view) * kwh);
			this.beam[g] = beam;
			this.circumsolar[g] = circumsolar;
			this.otherCircumsolar[g] = otherSplit.circumsolar * facing * kwh;
			this.otherIsotropic[g] = otherSplit.isotropic * view * kwh;
			this.otherHorizon[g] = bandOf(otherSplit, sinTilt, facing, view) * kwh;
			const seen = isotropic * open;
			// A band that takes away goes with the sky about it, so that the sum never falls below 0.
			const band = horizon * (horizon > 0 ? horizonOpen : open);
			for (let turn = 0; turn < 2; turn++) {
				const at = (g * BINS + (turn === 0 ? month : hour)) * PARTS;
				part.without[at] += beam;
				part.without[at + 1] += circumsolar;
				part.without[at + 2] += seen;
				part.without[at + 3] += band;
				part.without[at + 4] += ground;
			}
			part.otherWithout[g] +=
				beam +
				this.otherCircumsolar[g] +
				this.otherIsotropic[g] * open +
				this.otherHorizon[g] * (this.otherHorizon[g] > 0 ? horizonOpen : open) +
				ground;
		}
		part.horizontal[month * 3] += steps.global[s] * kwh;
		part.horizontal[month * 3 + 1] += dhi * kwh;
		part.horizontal[month * 3 + 2] += dni * kwh;
	}

	/** Sky light that neighbours and obstacles take from each tracker. */
	private takeSky(s: number): void {
		const { part, corners, sky, steps } = this;
		const { groupOf } = this.field.engine;
		const size = part.to - part.from;
		const base = sky.stateOf[steps.month[s]] * SKY_NODES;
		const w = corners.weight;
		// A corner of no weight stands for itself with the first one's view, which it then does not change.
		const first = sky.views[base + corners.node[w.findIndex((weight) => weight > 0)]]!;
		const v0 = sky.views[base + corners.node[0]] ?? first;
		const v1 = sky.views[base + corners.node[1]] ?? first;
		const v2 = sky.views[base + corners.node[2]] ?? first;
		const v3 = sky.views[base + corners.node[3]] ?? first;
		const [w0, w1, w2, w3] = w;
		const { lost: l0, horizonLost: h0 } = v0;
		const { lost: l1, horizonLost: h1 } = v1;
		const { lost: l2, horizonLost: h2 } = v2;
		const { lost: l3, horizonLost: h3 } = v3;
		const month = part.skyLost.subarray(steps.month[s] * size, (steps.month[s] + 1) * size);
		const hour = part.skyLost.subarray((12 + steps.hour[s]) * size, (13 + steps.hour[s]) * size);
		const { horizonLost, otherSkyLost } = part;
		const { isotropic, horizon, otherIsotropic, otherHorizon } = this;
		for (let k = 0; k < size; k++) {
			const g = groupOf[part.from + k];
			const covered = w0 * l0[k] + w1 * l1[k] + w2 * l2[k] + w3 * l3[k];
			if (covered === 0) continue;
			let lost = isotropic[g] * covered;
			let otherLost = otherIsotropic[g] * covered;
			if (horizon[g] !== 0 || otherHorizon[g] !== 0) {
				const band = w0 * h0[k] + w1 * h1[k] + w2 * h2[k] + w3 * h3[k];
				const bandLost = horizon[g] * (horizon[g] > 0 ? band : covered);
				horizonLost[k] += bandLost;
				lost += bandLost;
				otherLost += otherHorizon[g] * (otherHorizon[g] > 0 ? band : covered);
			}
			month[k] += lost;
			hour[k] += lost;
			otherSkyLost[k] += otherLost;
		}
	}

	/** Beam and circumsolar light that shade takes, by area and by the strings. */
	private takeShade(s: number): void {
		const { part, shares, steps, field, alike, beam, circumsolar, otherCircumsolar } = this;
		const { engine } = field;
		const { from, to } = part;
		const size = to - from;
		this.month = steps.month[s] * size;
		this.hour = (12 + steps.hour[s]) * size;
		if (alike) {
			const { cosine } = engine.poses[0];
			if (cosine <= LEAST_COSINE || (beam[0] === 0 && circumsolar[0] === 0 && otherCircumsolar[0] === 0))
				return;
			alike.shares(engine.poses[0].axes(), 0, shares, from, to, this.visitAlike);
			return;
		}
		engine.setDay(steps.day[s]);
		if (engine.shares(shares, from, to) === 0) return;
		for (let i = from; i < to; i++) {
			if (shares[i] === 0) continue;
			const g = engine.groupOf[i];
			if (beam[g] === 0 && circumsolar[g] === 0 && otherCircumsolar[g] === 0) continue;
			const groups = (this.current = this.groupsOf[i]);
			groups.clear();
			if (shares[i] < 1) {
				engine.collect(i);
				engine.shadowsAhead(i, 0, this.visit);
			}
			this.take(i, shares[i], groups);
		}
	}

	/** Shade of a table with its cell groups counted; a table wholly in shade loses all whatever was counted. */
	private take(i: number, share: number, groups: ProtectedGroups): void {
		const { part, beam, circumsolar, otherCircumsolar } = this;
		const g = this.field.engine.groupOf[i];
		const likely = share < 1 ? stringLoss(share, groups.shaded, groups.count) : 1;
		const worst = share < 1 ? Math.max(likely, groups.stringsTouched() / groups.strings) : 1;
		const k = i - part.from;
		const month = this.month + k;
		const hour = this.hour + k;
		const direct = beam[g] + circumsolar[g];
		const beamLost = beam[g] * share;
		const circumsolarLost = circumsolar[g] * share;
		const strings = direct * (likely - share);
		part.beamLost[month] += beamLost;
		part.beamLost[hour] += beamLost;
		part.circumsolarLost[month] += circumsolarLost;
		part.circumsolarLost[hour] += circumsolarLost;
		part.stringsLost[month] += strings;
		part.stringsLost[hour] += strings;
		part.worstLost[k] += direct * (worst - share);
		part.otherShadeLost[k] += (beam[g] + otherCircumsolar[g]) * likely;
	}
}

/** Light of the horizon band on a plane, W/m²; a dark band takes no more than there is. */
function bandOf(split: SkySplit, sinTilt: number, facing: number, view: number): number {
	return Math.max(-(split.circumsolar * facing + split.isotropic * view), split.horizon * sinTilt);
}
