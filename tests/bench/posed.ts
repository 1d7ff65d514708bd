import { prepareField, sunVector, type Field, type RunInput, type SunDirection } from '../../src/lib/core';
import type { Bench, Timing } from './bench';

/** One table under one sun, as the general libraries get it; metres, local frame moved to the field's middle. */
export interface PosedTable {
	centre: readonly number[];
	u: readonly number[];
	v: readonly number[];
	n: readonly number[];
	halfWidth: number;
	halfHeight: number;
	steelHalfWidth: number;
	steelHalfHeight: number;
	halfGap: number;
	/** n.s; only tables above 0 are asked about. */
	cosine: number;
}

export interface PosedScene {
	sun: SunDirection;
	/** Towards the sun. */
	s: readonly number[];
	tables: PosedTable[];
	/** Our own answers. */
	shares: Float64Array;
}

/** A field of tables alone under some suns, with our shares. */
export function posedScenes(
	input: RunInput,
	suns: readonly SunDirection[]
): { field: Field; scenes: PosedScene[] } {
	const field = prepareField(input);
	const { engine } = field;
	const middle = [0, 0, 0];
	for (let i = 0; i < engine.count; i++) {
		middle[0] += engine.east[i] / engine.count;
		middle[1] += engine.north[i] / engine.count;
		middle[2] += engine.up[i] / engine.count;
	}
	const scenes = suns.map((sun): PosedScene => {
		engine.setSun(sun.azimuthDeg, sun.elevationDeg);
		const shares = new Float64Array(engine.count);
		engine.shares(shares);
		const tables = Array.from({ length: engine.count }, (_, i): PosedTable => {
			const { halfWidth, halfHeight, steelHalfWidth, steelHalfHeight, halfGap } =
				engine.groups[engine.groupOf[i]];
			const { u, v, n } = engine.poses[engine.groupOf[i]];
			const centre = engine.centre(i).map((value, c) => value - middle[c]);
			const cosine = engine.cosine(i);
			return { centre, u, v, n, halfWidth, halfHeight, steelHalfWidth, steelHalfHeight, halfGap, cosine };
		});
		return { sun, s: sunVector(sun.azimuthDeg, sun.elevationDeg), tables, shares };
	});
	return { field, scenes };
}

/** Below this cosine a table is grazed: a ray caster's step off the glass is then as large as what it asks about. */
export const LEAST_ASKED_COSINE = 0.02;

/** How far another method's shares are from ours, in percent of a table. */
export class Errors {
	private largest = 0;
	private sum = 0;
	private partly = 0;

	add(ours: number, theirs: number): void {
		const error = 100 * Math.abs(ours - theirs);
		if (error > this.largest) this.largest = error;
		// Wholly lit or wholly dark tables are easy for everyone and would thin the mean.
		if (ours > 0 && ours < 1) {
			this.sum += error;
			this.partly++;
		}
	}

	/** Mean over the partly shaded tables; largest over all. */
	note(bench: Bench, stem: string): void {
		const mean = this.partly > 0 ? this.sum / this.partly : 0;
		bench.note(`${stem}.meanErrorPercent`, mean, `over ${this.partly} partly shaded tables`);
		bench.note(`${stem}.maxErrorPercent`, this.largest);
	}
}

/** Our own rate on the same scenes, for the ratio. */
export function coreTiming(bench: Bench, { field, scenes }: { field: Field; scenes: PosedScene[] }): Timing {
	const shares = new Float64Array(field.engine.count);
	return bench.time(() => {
		for (const { sun } of scenes) {
			field.engine.setSun(sun.azimuthDeg, sun.elevationDeg);
			field.engine.shares(shares);
		}
	});
}
