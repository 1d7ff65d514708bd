import type { MountPlaceResult } from '../results';
import type { MountPlaces } from './places';

const iso = (day: number): string => new Date(day * 86400000).toISOString().slice(0, 10);
/** Hours are kept to a ten-thousandth: finer is rounding and only makes results long. */
const rounded = (value: number): number => Math.round(value * 1e4) / 1e4;

/** Counts for every candidate place of one tracker, step by step through a year. */
export class MountTally {
	private readonly size: number;
	private readonly shaded: Int32Array;
	private readonly above5: Int32Array;
	private readonly blind: Int32Array;
	private readonly blindByMonth: Int32Array;
	private readonly run: Int32Array;
	private readonly longestRun: Int32Array;
	private readonly longestRunDay: Int32Array;
	private readonly blindRun: Int32Array;
	private readonly longestBlind: Int32Array;
	private readonly waiting: Uint8Array;
	private readonly runUp: Int32Array;
	private readonly runUpSum: Int32Array;
	private readonly runUpWorst: Int32Array;
	private waitingCount = 0;
	private days = 0;
	private seenSun = false;
	/** Some run is under way. */
	private busy = false;

	constructor(readonly places: MountPlaces) {
		const size = (this.size = places.mounts.length);
		const ints = () => new Int32Array(size);
		this.shaded = ints();
		this.above5 = ints();
		this.blind = ints();
		this.blindByMonth = new Int32Array(12 * size);
		this.run = ints();
		this.longestRun = ints();
		this.longestRunDay = ints();
		this.blindRun = ints();
		this.longestBlind = ints();
		this.waiting = new Uint8Array(size);
		this.runUp = ints();
		this.runUpSum = ints();
		this.runUpWorst = ints();
	}

	/** Ends all runs: the day is over, or the skyline has taken the sun. */
	breakRuns(): void {
		if (!this.busy) return;
		this.run.fill(0);
		this.blindRun.fill(0);
		this.busy = false;
	}

	/** The site's day is over: heads that never had the sun waited until now. */
	endDay(): void {
		this.breakRuns();
		if (this.waitingCount > 0) for (let k = 0; k < this.size; k++) if (this.waiting[k]) this.arrived(k);
		this.seenSun = false;
	}

	private arrived(k: number): void {
		this.waiting[k] = 0;
		this.waitingCount--;
		const steps = this.runUp[k];
		this.runUpSum[k] += steps;
		if (steps > this.runUpWorst[k]) this.runUpWorst[k] = steps;
	}

	/** A step at which nothing shades any place. */
	clearStep(tableLit: boolean): void {
		this.breakRuns();
		if (tableLit && !this.seenSun) {
			this.seenSun = true;
			this.days++;
		}
		if (this.waitingCount > 0) for (let k = 0; k < this.size; k++) if (this.waiting[k]) this.arrived(k);
	}

	/** A step with some places shaded (1 in `marks`). `share` is the shaded share of the own table. */
	step(
		marks: Uint8Array,
		elevationDeg: number,
		month: number,
		day: number,
		share: number,
		facing: boolean
	): void {
		const halfLit = facing && share <= 0.5;
		if (facing && share < 0.999 && !this.seenSun) {
			this.seenSun = true;
			this.days++;
			this.waiting.fill(1);
			this.runUp.fill(0);
			this.waitingCount = this.size;
		}
		const months = this.blindByMonth;
		const counts = elevationDeg > 3;
		const high = elevationDeg > 5;
		let busy = false;
		for (let k = 0; k < this.size; k++) {
			if (!marks[k]) {
				this.run[k] = 0;
				this.blindRun[k] = 0;
				continue;
			}
			this.shaded[k]++;
			if (high) this.above5[k]++;
			if (counts) {
				busy = true;
				if (++this.run[k] > this.longestRun[k]) {
					this.longestRun[k] = this.run[k];
					this.longestRunDay[k] = day;
				}
			} else {
				this.run[k] = 0;
			}
			if (halfLit) {
				busy = true;
				this.blind[k]++;
				months[12 * k + month]++;
				if (++this.blindRun[k] > this.longestBlind[k]) this.longestBlind[k] = this.blindRun[k];
			} else {
				this.blindRun[k] = 0;
			}
		}
		if (this.waitingCount > 0) {
			for (let k = 0; k < this.size; k++) {
				if (!this.waiting[k]) continue;
				if (marks[k]) this.runUp[k]++;
				else this.arrived(k);
			}
		}
		this.busy = busy;
	}

	result(k: number, stepMinutes: number): MountPlaceResult {
		const hours = (steps: number): number => rounded((steps * stepMinutes) / 60);
		return {
			mount: this.places.mounts[k],
			shadedHours: hours(this.shaded[k]),
			shadedAbove5Hours: hours(this.above5[k]),
			blindHours: hours(this.blind[k]),
			longestBlindMinutes: this.longestBlind[k] * stepMinutes,
			longestRunMinutes: this.longestRun[k] * stepMinutes,
			longestRunDate: this.longestRun[k] > 0 ? iso(this.longestRunDay[k]) : null,
			runUpMeanMinutes: this.days > 0 ? rounded((this.runUpSum[k] * stepMinutes) / this.days) : 0,
			runUpWorstMinutes: this.runUpWorst[k] * stepMinutes,
			blindByMonth: Array.from(this.blindByMonth.subarray(12 * k, 12 * k + 12), hours)
		};
	}
}
