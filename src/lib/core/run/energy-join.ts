import type { TrackerModel } from '../document';
import { tableAreaM2 } from '../layout/ground-cover';
import { weatherClosure } from '../energy/weather-year';
import type {
	EnergyLosses,
	EnergyLossSeries,
	EnergyParts,
	EnergyResult,
	RunInput,
	TrackerEnergy
} from '../results';
import { BINS, PARTS, type EnergyPart } from './energy-part';
import { energyReasons } from './energy-reasons';
import {
	GROUND_WORDS,
	otherSkyModel,
	SKY_MODEL_WORDS,
	SKY_VIEW_WORDS,
	skySourceWords,
	STRING_WORDS
} from './energy-words';
import { weatherYearOf } from './energy-weather';

/** Sums of one tracker or of the field: all kWh/m² of glass, or kWh when weighted by glass. */
class Sums {
	/** [bin][part] */
	readonly without = new Float64Array(BINS * PARTS);
	readonly beamLost = new Float64Array(BINS);
	readonly circumsolarLost = new Float64Array(BINS);
	readonly skyLost = new Float64Array(BINS);
	readonly stringsLost = new Float64Array(BINS);
	horizonLost = 0;
	worstLost = 0;
	otherWithout = 0;
	otherLost = 0;

	/** Adds another's sums, weighted. */
	add(from: Sums, weight: number): void {
		for (let k = 0; k < BINS * PARTS; k++) this.without[k] += from.without[k] * weight;
		for (let k = 0; k < BINS; k++) {
			this.beamLost[k] += from.beamLost[k] * weight;
			this.circumsolarLost[k] += from.circumsolarLost[k] * weight;
			this.skyLost[k] += from.skyLost[k] * weight;
			this.stringsLost[k] += from.stringsLost[k] * weight;
		}
		this.horizonLost += from.horizonLost * weight;
		this.worstLost += from.worstLost * weight;
		this.otherWithout += from.otherWithout * weight;
		this.otherLost += from.otherLost * weight;
	}
}

function readTracker(part: EnergyPart, i: number, out: Sums): void {
	const size = part.to - part.from;
	const k = i - part.from;
	const g = part.groupOf[i];
	out.without.set(part.without.subarray(g * BINS * PARTS, (g + 1) * BINS * PARTS));
	for (let b = 0; b < BINS; b++) {
		const at = b * size + k;
		out.beamLost[b] = part.beamLost[at];
		out.circumsolarLost[b] = part.circumsolarLost[at];
		out.skyLost[b] = part.skyLost[at];
		out.stringsLost[b] = part.stringsLost[at];
	}
	out.horizonLost = part.horizonLost[k];
	out.worstLost = part.worstLost[k];
	out.otherWithout = part.otherWithout[g];
	out.otherLost = part.otherSkyLost[k] + part.otherShadeLost[k];
}

/** Sum over the twelve months. */
function year(list: Float64Array): number {
	let sum = 0;
	for (let m = 0; m < 12; m++) sum += list[m];
	return sum;
}

function partsOf(s: Sums, weight: number): { without: EnergyParts; with: EnergyParts } {
	const sums = new Float64Array(PARTS);
	for (let m = 0; m < 12; m++) for (let p = 0; p < PARTS; p++) sums[p] += s.without[m * PARTS + p];
	const parts = (beam: number, circumsolar: number, isotropic: number, horizon: number): EnergyParts => {
		const ground = sums[4] / weight;
		return {
			beam: beam / weight,
			circumsolar: circumsolar / weight,
			isotropic: isotropic / weight,
			horizon: horizon / weight,
			ground,
			total: (beam + circumsolar + isotropic + horizon + sums[4]) / weight
		};
	};
	const isotropicLost = year(s.skyLost) - s.horizonLost;
	return {
		without: parts(sums[0], sums[1], sums[2], sums[3]),
		with: parts(
			sums[0] - year(s.beamLost),
			sums[1] - year(s.circumsolarLost),
			sums[2] - isotropicLost,
			sums[3] - s.horizonLost
		)
	};
}

function lossesOf(s: Sums): EnergyLosses {
	let total = 0;
	for (let k = 0; k < 12 * PARTS; k++) total += s.without[k];
	const over = (lost: number): number => (total > 0 ? lost / total : 0);
	const beam = over(year(s.beamLost));
	const sky = over(year(s.circumsolarLost) + year(s.skyLost));
	const electrical = { low: 0, likely: over(year(s.stringsLost)), high: over(s.worstLost) };
	return {
		beam,
		sky,
		electrical,
		total: {
			low: beam + sky,
			likely: beam + sky + electrical.likely,
			high: beam + sky + electrical.high
		}
	};
}

function seriesOf(s: Sums, from: number, count: number): EnergyLossSeries {
	const out: EnergyLossSeries = { beam: [], sky: [], electrical: [] };
	for (let b = from; b < from + count; b++) {
		let total = 0;
		for (let p = 0; p < PARTS; p++) total += s.without[b * PARTS + p];
		const over = (lost: number): number | null => (total > 0 ? lost / total : null);
		out.beam.push(over(s.beamLost[b]));
		out.sky.push(over(s.circumsolarLost[b] + s.skyLost[b]));
		out.electrical.push(over(s.stringsLost[b]));
	}
	return out;
}

/**
 * Puts the parts of an energy year together: `parts` follow each other and cover the whole field of `input`. The field's
 * means are weighted by glass and summed in layout order, whatever the parts were, so that one or many give the same
 * bytes. Throws when a part is missing.
 */
export function joinEnergyYear(input: RunInput, parts: readonly EnergyPart[]): EnergyResult {
	const settings = input.energy;
	if (!settings) throw new Error('An energy year needs its settings');
	const { trackers: placed, models } = input.layout;
	const byId = new Map<string, TrackerModel>(models.map((model) => [model.id, model]));
	const field = new Sums();
	const one = new Sums();
	const trackers: TrackerEnergy[] = [];
	let glassM2 = 0;
	let ratedW = 0;
	let worst: TrackerEnergy | null = null;
	for (const part of parts) {
		if (part.from !== trackers.length)
			throw new Error(`Energy year: the part from ${trackers.length} is missing`);
		for (let i = part.from; i < part.to; i++) {
			readTracker(part, i, one);
			const tracker: TrackerEnergy = {
				trackerId: placed[i].id,
				tag: placed[i].tag,
				...partsOf(one, 1),
				losses: lossesOf(one),
				months: seriesOf(one, 0, 12),
				hours: seriesOf(one, 12, 24)
			};
			trackers.push(tracker);
			if (worst === null || tracker.losses.total.likely > worst.losses.total.likely) worst = tracker;
			const model = byId.get(placed[i].modelId);
			const areaM2 = model ? tableAreaM2(model) : 0;
			glassM2 += areaM2;
			ratedW += model?.powerW ?? 0;
			field.add(one, areaM2);
		}
	}
	if (trackers.length !== placed.length || parts.length === 0) {
		throw new Error(`Energy year: ${trackers.length} of ${placed.length} trackers have a part`);
	}
	const { steps, horizontal } = parts[0];
	const means = partsOf(field, Math.max(glassM2, 1e-12));
	const losses = lossesOf(field);
	const other = otherSkyModel(settings.skyModel);
	const otherWith = field.otherWithout - field.otherLost;
	const sumOf = (quantity: number): number => {
		let sum = 0;
		for (let m = 0; m < 12; m++) sum += horizontal[m * 3 + quantity];
		return sum;
	};
	const result: EnergyResult = {
		model: {
			sky: skySourceWords(settings.sky),
			skyModel: SKY_MODEL_WORDS[settings.skyModel],
			ground: GROUND_WORDS,
			skyView: SKY_VIEW_WORDS,
			strings: STRING_WORDS,
			steps: steps.count,
			stepMinutes: steps.stepMinutes,
			linkeTurbidity: steps.linkeTurbidity
		},
		horizontal: {
			globalKwhM2: sumOf(0),
			diffuseKwhM2: sumOf(1),
			directNormalKwhM2: sumOf(2),
			monthlyGlobalKwhM2: Array.from({ length: 12 }, (_, m) => horizontal[m * 3]),
			unplacedKwhM2: steps.unplacedKwhM2
		},
		closure: settings.sky.source === 'weather' ? weatherClosure(weatherYearOf(settings.sky)) : null,
		missingHours: steps.missingHours,
		field: {
			...means,
			losses,
			months: seriesOf(field, 0, 12),
			hours: seriesOf(field, 12, 24),
			monthlyWithoutKwhM2: Array.from({ length: 12 }, (_, m) => {
				let sum = 0;
				for (let p = 0; p < PARTS; p++) sum += field.without[m * PARTS + p];
				return glassM2 > 0 ? sum / glassM2 : 0;
			}),
			referenceYieldH: {
				low: means.without.total * (1 - losses.total.high),
				likely: means.without.total * (1 - losses.total.likely),
				high: means.without.total * (1 - losses.total.low)
			},
			ratedKw: ratedW / 1000,
			otherModel: {
				skyModel: other,
				withoutKwhM2: glassM2 > 0 ? field.otherWithout / glassM2 : 0,
				withKwhM2: glassM2 > 0 ? otherWith / glassM2 : 0,
				totalLoss: field.otherWithout > 0 ? field.otherLost / field.otherWithout : 0
			},
			worstTrackerId: worst !== null && worst.losses.total.likely > 0 ? worst.trackerId : null
		},
		trackers,
		reasons: []
	};
	result.reasons = energyReasons(input, result);
	return result;
}
