import type { Place } from '../document';
import { positionFromPlace } from '../sun/position';
import { SunSeries } from '../sun/series';
import { clearBeam, SOLAR_CONSTANT } from '../energy/beam';

/** Throws on a step that no run can be made of: it would never end. Callers check what people type. */
export function assertStep(stepMinutes: number): void {
	if (!(stepMinutes >= 0.1 && stepMinutes <= 60))
		throw new Error(`A step of ${stepMinutes} minutes is not possible`);
}

/** One step of a run with the sun above the horizon. */
export interface SunStep {
	/** Middle of the interval, UTC milliseconds. */
	timeMs: number;
	azimuthDeg: number;
	/** Apparent. */
	elevationDeg: number;
	/** Direct normal irradiance of the pages' clear sky, W/m². */
	beam: number;
}

/** The pages' own sun and sky at one place: apparent sun, clear beam at its altitude, distance of the sun by date. */
export class SunSky {
	private readonly series = new SunSeries();

	constructor(private readonly place: Pick<Place, 'latitudeDeg' | 'longitudeDeg' | 'altitudeM'>) {}

	/** The step at a time; its elevation may be below 0, where there is no beam. */
	at(timeMs: number): SunStep {
		const sun = this.series.placeAt(timeMs);
		const { latitudeDeg, longitudeDeg, altitudeM } = this.place;
		const { azimuthDeg, apparentElevationDeg } = positionFromPlace(sun, latitudeDeg, longitudeDeg);
		const extraterrestrial = SOLAR_CONSTANT / (sun.distanceAu * sun.distanceAu);
		return {
			timeMs,
			azimuthDeg,
			elevationDeg: apparentElevationDeg,
			beam: clearBeam(apparentElevationDeg, altitudeM, extraterrestrial)
		};
	}
}
