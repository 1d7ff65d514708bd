import type { SunDirection } from '../conventions';
import { dayOfYear, extraterrestrialNormal } from './extraterrestrial';
import { planeOfArray, twoAxisPlane } from './plane-of-array';
import type { SkyModel } from './sky-parts';
import { midHourSun, type WeatherYear } from './weather-year';

export interface GainOptions {
	model: SkyModel;
	/** 0..1 */
	albedo: number;
	/** Of the fixed plane; 180 in the north and 0 in the south unless given. */
	fixedAzimuthDeg?: number;
	/** Of the fixed plane; the best whole degree unless given. */
	fixedTiltDeg?: number;
}

export interface TrackingGain {
	/** Sums over the file, kWh/m² of plane, nothing shaded. */
	horizontalKwhM2: number;
	fixedKwhM2: number;
	twoAxisKwhM2: number;
	fixedTiltDeg: number;
	fixedAzimuthDeg: number;
	/** Two-axis over fixed and over horizontal, less 1; null when there is nothing to divide by. */
	overFixed: number | null;
	overHorizontal: number | null;
	/** Hours left out for want of a value. */
	missingHours: number;
}

interface LightHour {
	sun: SunDirection;
	directNormal: number;
	diffuseHorizontal: number;
	globalHorizontal: number;
	extraterrestrialNormal: number;
}

/**
 * What a lone two-axis table receives in the hours of a weather file, beside a fixed plane and level ground. Sun of
 * mid-hour with refraction, extraterrestrial of Spencer 1971, no losses in glass or cells.
 */
export function trackingGain(weather: WeatherYear, options: GainOptions): TrackingGain {
	const { hours, missingHours } = lightHours(weather);
	const { model, albedo } = options;
	const fixedAzimuthDeg = options.fixedAzimuthDeg ?? (weather.place.latitudeDeg < 0 ? 0 : 180);
	const sumOf = (light: (hour: LightHour) => number) =>
		hours.reduce((sum, hour) => sum + light(hour), 0) / 1000;
	const planes = hours.map((hour) => ({ ...hour, azimuthDeg: fixedAzimuthDeg, tiltDeg: 0, albedo, model }));
	const fixedAt = (tiltDeg: number) =>
		planes.reduce((sum, plane) => {
			plane.tiltDeg = tiltDeg;
			return sum + planeOfArray(plane).total;
		}, 0) / 1000;
	const fixedTiltDeg = options.fixedTiltDeg ?? bestTiltDeg(fixedAt);
	const horizontalKwhM2 = sumOf((hour) => hour.globalHorizontal);
	const fixedKwhM2 = fixedAt(fixedTiltDeg);
	const twoAxisKwhM2 = sumOf((hour) => twoAxisPlane({ ...hour, albedo, model }).total);
	return {
		horizontalKwhM2,
		fixedKwhM2,
		twoAxisKwhM2,
		fixedTiltDeg,
		fixedAzimuthDeg,
		overFixed: fixedKwhM2 > 0 ? twoAxisKwhM2 / fixedKwhM2 - 1 : null,
		overHorizontal: horizontalKwhM2 > 0 ? twoAxisKwhM2 / horizontalKwhM2 - 1 : null,
		missingHours
	};
}

/** Whole degree 0..90 with the greatest sum: every fifth first, then the ones about the best. */
function bestTiltDeg(sumAt: (tiltDeg: number) => number): number {
	const best = (tilts: number[]) => {
		const sums = tilts.map(sumAt);
		return tilts[sums.indexOf(Math.max(...sums))];
	};
	const coarse = best(Array.from({ length: 19 }, (_, i) => i * 5));
	const near = Array.from({ length: 9 }, (_, i) => coarse - 4 + i);
	return best(near.filter((tilt) => tilt >= 0 && tilt <= 90));
}

function lightHours(weather: WeatherYear): { hours: LightHour[]; missingHours: number } {
	const hours: LightHour[] = [];
	let missingHours = 0;
	for (const row of weather.rows) {
		if (row.ghi === null || row.dni === null || row.dhi === null) {
			missingHours += 1;
			continue;
		}
		if (row.ghi <= 0 && row.dni <= 0 && row.dhi <= 0) continue;
		const { azimuthDeg, apparentElevationDeg } = midHourSun(weather, row);
		hours.push({
			sun: { azimuthDeg, elevationDeg: apparentElevationDeg },
			directNormal: row.dni,
			diffuseHorizontal: row.dhi,
			globalHorizontal: row.ghi,
			extraterrestrialNormal: extraterrestrialNormal(dayOfYear(row.startMs, weather.utcOffsetHours))
		});
	}
	return { hours, missingHours };
}
