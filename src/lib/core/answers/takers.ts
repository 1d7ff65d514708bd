import type { RunInput } from '../results';
import { BY_GROUND, removalOf, WHENS, type LightLedger } from './light-ledger';
import type { LightPair, Taker, TakersRest, WorstTracker } from './results';

/** Takers that are told by name, of one tracker. */
const MOST_TAKERS = 8;
/** A taker whose removal gives back less than this share of the tracker's beam is only summed: a thousandth of a percent. */
const MATTERS = 1e-5;

/** Place of the greatest of some numbers; the first of equals. */
function greatest(values: Float64Array): number {
	let best = 0;
	for (let k = 1; k < values.length; k++) if (values[k] > values[best]) best = k;
	return best;
}

const whenOf = (values: Float64Array): { month: number; half: 'morning' | 'afternoon' } => {
	const at = greatest(values);
	return { month: Math.floor(at / 2), half: at % 2 === 0 ? 'morning' : 'afternoon' };
};

/** Reads a joined ledger of the whole field; `withoutKwh` is the field's beam without shade, kWh/m² summed over its trackers. */
export function bookkeeper(input: RunInput, ledger: LightLedger, withoutKwh: number) {
	const { trackers } = input.layout;
	const { obstacles } = input.plot;

	const takerOf = (p: number, i: number): Taker => {
		const by = ledger.pairBy[p];
		const detail = ledger.pairDetail[p];
		const without = ledger.without[i];
		const who =
			by >= 0
				? { kind: 'tracker' as const, id: trackers[by].id, name: trackers[by].tag }
				: by === BY_GROUND
					? { kind: 'ground' as const, id: '', name: 'ground' }
					: { kind: 'obstacle' as const, id: obstacles[-1 - by].id, name: obstacles[-1 - by].name };
		return {
			...who,
			removalLoss: removalOf(ledger, p) / without,
			aloneLoss: ledger.pairAlone[p] / without,
			...whenOf(ledger.detailWhen.subarray(detail * WHENS, (detail + 1) * WHENS))
		};
	};

	/** Pairs of a tracker in which light is taken, worst first: by removal, then by what each would take alone. */
	const ranked = (i: number): number[] => {
		const pairs: number[] = [];
		for (let p = ledger.pairStart[i]; p < ledger.pairStart[i + 1]; p++) {
			if (ledger.pairAlone[p] > 0) pairs.push(p);
		}
		return pairs.sort(
			(p, q) =>
				removalOf(ledger, q) - removalOf(ledger, p) || ledger.pairAlone[q] - ledger.pairAlone[p] || p - q
		);
	};

	const takersOf = (i: number): { takers: Taker[]; rest: TakersRest | null } => {
		const all = ranked(i);
		const named = all.slice(0, MOST_TAKERS).filter((p) => ledger.pairAlone[p] >= MATTERS * ledger.without[i]);
		const others = all.slice(named.length);
		const sum = (of: (p: number) => number) =>
			others.reduce((total, p) => total + of(p), 0) / ledger.without[i];
		return {
			takers: named.map((p) => takerOf(p, i)),
			rest:
				others.length === 0
					? null
					: {
							count: others.length,
							removalLoss: sum((p) => removalOf(ledger, p)),
							aloneLoss: sum((p) => ledger.pairAlone[p])
						}
		};
	};

	const takesFromField = new Float64Array(trackers.length);
	const taken: { p: number; i: number }[] = [];
	for (let i = 0; i < trackers.length; i++) {
		for (let p = ledger.pairStart[i]; p < ledger.pairStart[i + 1]; p++) {
			const removal = removalOf(ledger, p);
			if (!(removal > 0)) continue;
			const by = ledger.pairBy[p];
			if (by >= 0) takesFromField[by] += removal / withoutKwh;
			taken.push({ p, i });
		}
	}
	taken.sort((a, b) => removalOf(ledger, b.p) - removalOf(ledger, a.p) || a.p - b.p);

	const strongestPairs = (most: number): LightPair[] =>
		taken.slice(0, most).map(({ p, i }) => ({
			fromId: trackers[i].id,
			fromTag: trackers[i].tag,
			by: takerOf(p, i),
			fieldLoss: removalOf(ledger, p) / withoutKwh
		}));

	const worst = (most: number): WorstTracker[] =>
		trackers
			.map((tracker, i) => ({
				tracker,
				i,
				loss: ledger.without[i] > 0 ? ledger.lost[i] / ledger.without[i] : 0
			}))
			.filter(({ loss }) => loss > 0)
			.sort((a, b) => b.loss - a.loss || a.i - b.i)
			.slice(0, most)
			.map(({ tracker, i, loss }) => ({
				trackerId: tracker.id,
				tag: tracker.tag,
				beamLoss: loss,
				by: takersOf(i).takers[0] ?? null,
				...whenOf(ledger.lostWhen.subarray(i * WHENS, (i + 1) * WHENS)),
				hour: greatest(ledger.lostHour.subarray(i * 24, (i + 1) * 24))
			}));

	return { takersOf, takesFromField, strongestPairs, worst };
}
