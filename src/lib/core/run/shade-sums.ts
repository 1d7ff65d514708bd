import { AlikeKernel, ANY_SHADE, type SectorSuns, type ShadeSums } from '../shade/alike-kernel';
import { AlikeView } from '../shade/alike-view';
import type { ShadeEngine } from '../shade/engine';
import { SectorLists, type PairReach } from '../shade/sector-lists';
import { SolidBounds } from '../shade/solid-bounds';
import { LEAST_COSINE } from '../shade/table-group';
import { SECTOR_DEG, SUN_SECTORS, type SunTable } from './sun-table';

/** Shade of some tables, summed over many suns. */
export interface FieldSums extends ShadeSums {
	from: number;
	to: number;
	/** [group][bin]: weight x cosine without shade. */
	without: Float64Array;
	/** [group]: lights that the front faced. */
	facingSteps: Float64Array;
}

/**
 * Below this sine of the sun's elevation (1.5 degrees) shadows reach so far that lists of neighbours grow long, and each
 * light is looked at by itself. Only speed depends on it.
 */
const LOW_SINE = 0.026;

/** How far the tables of an engine reach for each other: by their sides when all are square to the sun's azimuth. */
function pairReach({ groups }: ShadeEngine, square: boolean): PairReach {
	if (square) {
		return {
			square,
			across: Float64Array.from(groups, (g) => g.steelHalfWidth),
			upright: Float64Array.from(groups, (g) => g.steelHalfHeight)
		};
	}
	// Offsets are the same for all tables of one group in one pose, and fall out of their differences.
	const one = groups.length === 1;
	const radius = Float64Array.from(
		groups,
		(g) => Math.hypot(g.steelHalfWidth, g.steelHalfHeight) + (one ? 0 : g.offsetReach)
	);
	return { square, across: radius, upright: radius };
}

/**
 * Shade of tables `from` to `to` (not itself) summed over many suns: what a year run is made of. Sectors of azimuth one
 * after another; tables of one kind in one pose by rectangles, everything else, and whatever an obstacle may reach, by
 * cutting lit pieces. A table's sums do not depend on which other tables are asked for. `heard` is told the part done,
 * 0..1, and stops the work by answering false; the result is null then.
 */
export function shadeSums(
	engine: ShadeEngine,
	suns: SunTable,
	bins: number,
	from = 0,
	to = engine.count,
	heard?: (done01: number) => boolean
): FieldSums | null {
	const work = new SectorWork(engine, suns, bins, from, to);
	for (let s = 0; s < SUN_SECTORS; s++) {
		const first = suns.sectorStart[s];
		const end = suns.sectorStart[s + 1];
		if (heard && heard(first / Math.max(1, suns.count)) === false) return null;
		if (end > first) work.sector(s, first, end);
	}
	return work.sums;
}

class SectorWork {
	readonly sums: FieldSums;
	private readonly lists = new SectorLists();
	private readonly kernel: AlikeKernel;
	private readonly view: AlikeView;
	private readonly solids: SolidBounds;
	private readonly shares: Float64Array;
	private readonly alike: boolean;

	constructor(
		private readonly engine: ShadeEngine,
		private readonly suns: SunTable,
		bins: number,
		from: number,
		to: number
	) {
		const { groups, count, horizons } = engine;
		const asked = Math.max(0, to - from);
		this.sums = {
			from,
			to,
			bins,
			lost: new Float64Array(asked * bins),
			share: new Float64Array(asked),
			shadedSteps: new Float64Array(asked),
			without: new Float64Array(groups.length * bins),
			facingSteps: new Float64Array(groups.length)
		};
		this.kernel = new AlikeKernel();
		this.view = new AlikeView(engine, groups[0]);
		this.solids = new SolidBounds(engine);
		this.shares = new Float64Array(count);
		this.alike = groups.length === 1 && groups[0].halfGap === 0 && horizons === null;
	}

	/** All lights of one sector of azimuth. */
	sector(s: number, first: number, end: number): void {
		const { engine, suns, sums, lists, solids } = this;
		const { from, to } = sums;
		const fromDeg = s * SECTOR_DEG;
		const toDeg = fromDeg + SECTOR_DEG;
		solids.turn(fromDeg, toDeg, suns.sine[end - 1], from, to);
		const square = this.alike && this.kernel.setSuns({ ...suns, first, end }, engine.groups[0].aimAt);
		const reach = pairReach(engine, square);
		let low = end;
		while (low > first && suns.sine[low - 1] < LOW_SINE) low--;
		const high: SectorSuns = { ...suns, first, end: low };
		if (low > first) {
			lists.build(engine, reach, { fromDeg, toDeg, sines: suns.sine, first, end: low }, from, to);
		}
		if (!this.alike) {
			this.general(first, low, true);
			this.general(low, end, false);
			return;
		}
		this.addUnshaded(first, end);
		if (low > first) {
			this.kernel.begin(lists);
			for (let i = from; i < to; i++) {
				this.kernel.add(i, engine, engine.groups[0], lists, high, solids.clearFrom(i - from), sums);
			}
		}
		for (let k = low; k < end; k++) this.lowLight(k, k - first);
		if (solids.highest > 0) this.nearSolids(first, end);
	}

	/** What the front of every alike table gets without shade. */
	private addUnshaded(first: number, end: number): void {
		const { kernel, suns, sums } = this;
		for (let k = first; k < end; k++) {
			const cosine = kernel.cosine(k - first);
			if (cosine === 0) continue;
			sums.without[suns.bin[k]] += suns.weight[k] * cosine;
			sums.facingSteps[0]++;
		}
	}

	/** One low light on all alike tables that no obstacle reaches. */
	private lowLight(k: number, ofSector: number): void {
		const { kernel, view, suns, sums, shares, solids } = this;
		const { from, to } = sums;
		const cosine = kernel.cosine(ofSector);
		if (cosine === 0) return;
		view.shares(kernel.axes, AlikeKernel.FIELDS * ofSector, shares, from, to);
		const weight = suns.weight[k] * cosine;
		const sine = suns.sine[k];
		for (let i = from; i < to; i++) {
			if (shares[i] > ANY_SHADE && sine >= solids.clearFrom(i - from)) {
				this.add(i - from, suns.bin[k], weight, shares[i]);
			}
		}
	}

	/** Alike tables that an obstacle may reach, light by light. */
	private nearSolids(first: number, end: number): void {
		const { engine, kernel, suns, sums, solids } = this;
		const { from, to } = sums;
		for (let k = first; k < end; k++) {
			const cosine = kernel.cosine(k - first);
			if (cosine === 0 || suns.sine[k] >= solids.highest) continue;
			engine.setDay(suns.day[k]);
			engine.setSun(suns.azimuthDeg[k], suns.elevationDeg[k]);
			for (let i = from; i < to; i++) {
				if (suns.sine[k] >= solids.clearFrom(i - from)) continue;
				const share = engine.share(i);
				if (share > ANY_SHADE) this.add(i - from, suns.bin[k], suns.weight[k] * cosine, share);
			}
		}
	}

	/** Unlike tables, light by light; neighbours from the sector's lists or, for low lights, from the whole field. */
	private general(first: number, end: number, listed: boolean): void {
		const { engine, suns, sums, lists, solids } = this;
		const { groups, groupOf, poses } = engine;
		const { from, to, bins } = sums;
		for (let k = first; k < end; k++) {
			engine.setDay(suns.day[k]);
			if (listed) engine.setSunOfSector(suns.azimuthDeg[k], suns.elevationDeg[k], lists, k - first);
			else engine.setSun(suns.azimuthDeg[k], suns.elevationDeg[k]);
			const sine = suns.sine[k];
			const bin = suns.bin[k];
			for (let g = 0; g < groups.length; g++) {
				if (poses[g].cosine <= LEAST_COSINE) continue;
				sums.without[g * bins + bin] += suns.weight[k] * poses[g].cosine;
				sums.facingSteps[g]++;
			}
			const skips = listed && engine.horizons === null;
			if (skips && sine >= Math.max(lists.highestClear, solids.highest)) continue;
			for (let i = from; i < to; i++) {
				if (skips && sine >= lists.clearFrom[i - from] && sine >= solids.clearFrom(i - from)) continue;
				const { cosine } = poses[groupOf[i]];
				if (cosine <= LEAST_COSINE) continue;
				const share = engine.share(i);
				if (share > ANY_SHADE) this.add(i - from, bin, suns.weight[k] * cosine, share);
			}
		}
	}

	private add(row: number, bin: number, weight: number, share: number): void {
		const { sums } = this;
		sums.lost[row * sums.bins + bin] += weight * share;
		sums.share[row] += share;
		sums.shadedSteps[row]++;
	}
}
