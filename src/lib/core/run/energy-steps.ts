import { RADIANS_PER_DEGREE } from '../conventions';
import type { Place } from '../document';
import { averageYear } from '../energy/average-year';
import { SOLAR_CONSTANT } from '../energy/beam';
import { ineichenPerez, linkeTurbidityOf } from '../energy/clear-sky';
import { dayOfYear, extraterrestrialNormal, seriesEquationOfTimeMin } from '../energy/extraterrestrial';
import { defaultLinkeTurbidity } from '../energy/turbidity';
import type { RunInput } from '../results';
import { positionFromPlace } from '../sun/position';
import { SunSeries } from '../sun/series';
import { weatherYearOf } from './energy-weather';

const HOUR_MS = 3600000;

/** Sun and sky of an energy year, step by step; only steps with any light. */
export interface EnergySteps {
	count: number;
	azimuthDeg: Float64Array;
	/** Apparent; may be below 0 in twilight. */
	elevationDeg: Float64Array;
	/** W/m², means over the step. */
	directNormal: Float64Array;
	diffuse: Float64Array;
	global: Float64Array;
	extraterrestrial: Float64Array;
	/** How long the step stands for: more than its own length on an average day. */
	hours: Float64Array;
	month: Uint8Array;
	/** Clock hour of standard time, 0..23. */
	hour: Uint8Array;
	/** 1..366. */
	day: Uint16Array;
	stepMinutes: number;
	linkeTurbidity: number[] | null;
	/** kWh/m² that no step holds because the sun stays down. */
	unplacedKwhM2: number;
	missingHours: number;
}

class StepList {
	private readonly rows: number[][] = Array.from({ length: 10 }, () => []);

	add(
		azimuthDeg: number,
		elevationDeg: number,
		directNormal: number,
		diffuse: number,
		global: number,
		extraterrestrial: number,
		hours: number,
		month: number,
		hour: number,
		day: number
	): void {
		const { rows } = this;
		rows[0].push(azimuthDeg);
		rows[1].push(elevationDeg);
		rows[2].push(directNormal);
		rows[3].push(diffuse);
		rows[4].push(global);
		rows[5].push(extraterrestrial);
		rows[6].push(hours);
		rows[7].push(month);
		rows[8].push(hour);
		rows[9].push(day);
	}

	finish(
		rest: Pick<EnergySteps, 'stepMinutes' | 'linkeTurbidity' | 'unplacedKwhM2' | 'missingHours'>
	): EnergySteps {
		const { rows } = this;
		return {
			count: rows[0].length,
			azimuthDeg: Float64Array.from(rows[0]),
			elevationDeg: Float64Array.from(rows[1]),
			directNormal: Float64Array.from(rows[2]),
			diffuse: Float64Array.from(rows[3]),
			global: Float64Array.from(rows[4]),
			extraterrestrial: Float64Array.from(rows[5]),
			hours: Float64Array.from(rows[6]),
			month: Uint8Array.from(rows[7]),
			hour: Uint8Array.from(rows[8]),
			day: Uint16Array.from(rows[9]),
			...rest
		};
	}
}

/** Steps of a run's energy year. Throws on settings that `checkEnergy` refuses: they are checked where they come in. */
export function energySteps(input: RunInput): EnergySteps {
	const sky = input.energy?.sky;
	switch (sky?.source) {
		case 'clear':
			return clearSteps(input, sky.linkeTurbidity ?? defaultLinkeTurbidity(input.place.latitudeDeg));
		case 'average':
			return averageSteps(input, sky.monthlyHorizontalKwhM2);
		case 'weather':
			return weatherSteps(input);
		default:
			throw new Error('An energy year needs its settings');
	}
}

/** Every step of the calendar year at the site, mid-interval, under a cloudless sky. */
function clearSteps(input: RunInput, turbidity: readonly number[]): EnergySteps {
	const { place, stepMinutes } = input;
	const offsetMs = input.utcOffsetMinutes * 60000;
	const stepMs = stepMinutes * 60000;
	const startMs = Date.UTC(input.year, 0, 1) - offsetMs;
	const endMs = Date.UTC(input.year + 1, 0, 1) - offsetMs;
	const monthly = Array.from({ length: 12 }, (_, month) => linkeTurbidityOf(turbidity, month));
	const series = new SunSeries();
	const list = new StepList();
	for (let timeMs = startMs + stepMs / 2; timeMs < endMs; timeMs += stepMs) {
		const sun = series.placeAt(timeMs);
		const { azimuthDeg, apparentElevationDeg } = positionFromPlace(
			sun,
			place.latitudeDeg,
			place.longitudeDeg
		);
		if (apparentElevationDeg <= 0) continue;
		const local = new Date(timeMs + offsetMs);
		const month = local.getUTCMonth();
		const extraterrestrial = SOLAR_CONSTANT / (sun.distanceAu * sun.distanceAu);
		const light = ineichenPerez({
			zenithDeg: 90 - apparentElevationDeg,
			altitudeM: place.altitudeM,
			linkeTurbidity: monthly[month],
			extraterrestrialNormal: extraterrestrial
		});
		list.add(
			azimuthDeg,
			apparentElevationDeg,
			light.directNormal,
			light.diffuseHorizontal,
			light.globalHorizontal,
			extraterrestrial,
			stepMinutes / 60,
			month,
			local.getUTCHours(),
			dayOfYear(timeMs, offsetMs / HOUR_MS)
		);
	}
	return list.finish({ stepMinutes, linkeTurbidity: monthly, unplacedKwhM2: 0, missingHours: 0 });
}

/** The longest step not above the one asked for of which whole ones fill a day, minutes. */
export function dayStepMinutes(stepMinutes: number): number {
	for (let step = Math.floor(stepMinutes); step > 1; step--) if (1440 % step === 0) return step;
	return 1;
}

/**
 * Steps of the twelve mean days, each standing for the days of its month. The sun is that of the mean day's declination,
 * without refraction (it moves the horizon by 0.6 degrees, where there is hardly any beam). Solar time is brought to the
 * clock by the equation of time of the mean day.
 */
function averageSteps(input: RunInput, monthlyKwhM2: readonly number[]): EnergySteps {
	const { place } = input;
	const stepMinutes = dayStepMinutes(input.stepMinutes);
	const year = averageYear(place.latitudeDeg, monthlyKwhM2, stepMinutes);
	if (!year.ok) throw new Error(year.message);
	const list = new StepList();
	let unplacedKwhM2 = 0;
	for (const month of year.months) {
		unplacedKwhM2 += month.unplacedKwhM2;
		const extraterrestrial = extraterrestrialNormal(month.dayOfYear);
		const toClock =
			input.utcOffsetMinutes / 60 - place.longitudeDeg / 15 - seriesEquationOfTimeMin(month.dayOfYear) / 60;
		for (const step of month.steps) {
			if (!(step.globalHorizontal > 0)) continue;
			const clock = (((step.solarHour + toClock) % 24) + 24) % 24;
			list.add(
				step.azimuthDeg,
				step.elevationDeg,
				step.directNormal,
				step.diffuseHorizontal,
				step.globalHorizontal,
				extraterrestrial,
				(month.days * stepMinutes) / 60,
				month.month,
				Math.min(23, Math.floor(clock)),
				month.dayOfYear
			);
		}
	}
	return list.finish({ stepMinutes, linkeTurbidity: null, unplacedKwhM2, missingHours: 0 });
}

/**
 * Hours of the file cut into equal steps. An hour's direct and diffuse light fall on those of its steps that have the sun
 * up, so that the hour keeps its sums; an hour with the sun down all through keeps its diffuse, evenly, and loses
 * whatever direct light the file gives it. Global is put together again from both. Months and hours by the file's clock.
 */
function weatherSteps(input: RunInput): EnergySteps {
	const sky = input.energy?.sky;
	if (sky?.source !== 'weather') throw new Error('An energy year of a weather file needs its hours');
	const { latitudeDeg, longitudeDeg } = input.place;
	const weather = weatherYearOf(sky);
	const parts = Math.ceil(60 / input.stepMinutes);
	const partMs = HOUR_MS / parts;
	const series = new SunSeries();
	const list = new StepList();
	const azimuth = new Float64Array(parts);
	const elevation = new Float64Array(parts);
	let missingHours = 0;
	let unplacedKwhM2 = 0;
	for (const row of weather.rows) {
		if (row.ghi === null || row.dni === null || row.dhi === null) missingHours++;
		const dni = row.dni ?? 0;
		const dhi = row.dhi ?? 0;
		if (row.ghi === null || row.dni === null || row.dhi === null || (dni <= 0 && dhi <= 0)) continue;
		let up = 0;
		let distance = 1;
		for (let p = 0; p < parts; p++) {
			const sun = series.placeAt(row.startMs + (p + 0.5) * partMs);
			const at = positionFromPlace(sun, latitudeDeg, longitudeDeg);
			azimuth[p] = at.azimuthDeg;
			elevation[p] = at.apparentElevationDeg;
			distance = sun.distanceAu;
			if (at.apparentElevationDeg > 0) up++;
		}
		const local = new Date(row.startMs + weather.utcOffsetHours * HOUR_MS);
		const day = dayOfYear(row.startMs, weather.utcOffsetHours);
		if (up === 0) unplacedKwhM2 += (row.ghi - dhi > 0 ? row.ghi - dhi : 0) / 1000;
		for (let p = 0; p < parts; p++) {
			const isUp = elevation[p] > 0;
			if (up > 0 && !isUp) continue;
			const share = up > 0 ? parts / up : 1;
			const direct = isUp ? dni * share : 0;
			const diffuse = dhi * share;
			list.add(
				azimuth[p],
				elevation[p],
				direct,
				diffuse,
				diffuse + direct * Math.max(0, Math.sin(elevation[p] * RADIANS_PER_DEGREE)),
				SOLAR_CONSTANT / (distance * distance),
				1 / parts,
				local.getUTCMonth(),
				local.getUTCHours(),
				day
			);
		}
	}
	return list.finish({ stepMinutes: 60 / parts, linkeTurbidity: null, unplacedKwhM2, missingHours });
}

/** Distance between two places along a great circle, km. */
export function placesApartKm(
	a: Pick<Place, 'latitudeDeg' | 'longitudeDeg'>,
	b: Pick<Place, 'latitudeDeg' | 'longitudeDeg'>
): number {
	const p = a.latitudeDeg * RADIANS_PER_DEGREE;
	const q = b.latitudeDeg * RADIANS_PER_DEGREE;
	const turn = (b.longitudeDeg - a.longitudeDeg) * RADIANS_PER_DEGREE;
	// Haversine: keeps its accuracy for small distances.
	const h = Math.sin((q - p) / 2) ** 2 + Math.cos(p) * Math.cos(q) * Math.sin(turn / 2) ** 2;
	return 2 * 6371 * Math.asin(Math.min(1, Math.sqrt(h)));
}
