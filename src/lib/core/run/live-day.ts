import { fieldSunHidden, type Field } from '../field';
import { groundHeightM } from '../geometry/ground';
import { ShadeEngine } from '../shade/engine';
import type { SunStep } from './sun-steps';

/**
 * The shade of one day that keeps up with a tracker being moved: every share is known, and a move asks again only for
 * the tables whose outline the moved one meets in the sun's view, before or after. Exact, like `dayShade`.
 */
export class LiveDay {
	/** [sun][tracker] shaded share, 0..1; 1 while the sun is hidden. */
	readonly shares: Float64Array[];
	private engine: ShadeEngine;
	private horizons: Field['horizons'];
	private readonly hidden: boolean[];
	private readonly asked: Int32Array;

	/** `suns` above the horizon, in any order; the field stays as it is. */
	constructor(
		private readonly field: Field,
		private readonly suns: readonly Pick<SunStep, 'azimuthDeg' | 'elevationDeg'>[],
		private readonly dayOfYear: number
	) {
		const { engine } = field;
		this.horizons = field.horizons;
		this.engine = this.engineAt(engine.east.slice(), engine.north.slice(), engine.up.slice());
		this.asked = new Int32Array(engine.count);
		this.hidden = suns.map((sun) => fieldSunHidden(field, sun));
		this.shares = suns.map((sun, k) => {
			const shares = new Float64Array(engine.count);
			if (this.hidden[k]) return shares.fill(1);
			this.engine.setSun(sun.azimuthDeg, sun.elevationDeg);
			this.engine.shares(shares);
			return shares;
		});
	}

	private engineAt(east: Float64Array, north: Float64Array, up: Float64Array): ShadeEngine {
		const { groupOf, groups, solids } = this.field.engine;
		const engine = new ShadeEngine(east, north, up, groupOf, groups, solids, this.horizons);
		engine.setDay(this.dayOfYear);
		return engine;
	}

	/** Moves a tracker of the layout to a plan point, metres, and brings every share up to date; how many were asked. */
	move(index: number, eastM: number, northM: number): number {
		const { field, suns, shares, asked } = this;
		const tracker = field.layout.trackers[index];
		const axisM = tracker.axisHeightM ?? field.models[index].axisHeightM;
		const upM = groundHeightM(field.plot.ground, eastM, northM) + axisM;
		const { east, north, up } = this.engine;
		const before = [east[index], north[index], up[index]] as const;
		if (this.horizons) {
			// The ground about its new place hides other lights from it.
			east[index] = eastM;
			north[index] = northM;
			up[index] = upM;
			this.horizons = this.horizons.moved(index, east, north, up);
			this.engine = this.engineAt(east, north, up);
		}
		const { engine } = this;
		let count = 0;
		for (let k = 0; k < suns.length; k++) {
			if (this.hidden[k]) continue;
			engine.place(index, before[0], before[1], before[2]);
			engine.setSun(suns[k].azimuthDeg, suns[k].elevationDeg, false);
			let found = engine.meeting(index, asked, 0);
			engine.place(index, eastM, northM, upM);
			found = engine.meeting(index, asked, found);
			for (let a = 0; a < found; a++) shares[k][asked[a]] = engine.share(asked[a]);
			shares[k][index] = engine.share(index);
			count += found + 1;
		}
		return count;
	}
}
