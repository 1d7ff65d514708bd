import { RADIANS_PER_DEGREE } from '../conventions';
import { sunPosition } from '../sun/position';

/** One hour of weather. Irradiances are means over the hour, W/m² (so Wh/m² of the hour); null where the file has none. */
export interface WeatherRow {
	/** Beginning of the hour, UTC. In a typical year the months come from different years. */
	startMs: number;
	/** Global horizontal. */
	ghi: number | null;
	/** Direct normal. */
	dni: number | null;
	/** Diffuse horizontal. */
	dhi: number | null;
	/** Air, degrees Celsius. */
	tempC: number | null;
	windMs: number | null;
}

export interface WeatherYear {
	place: { name: string; latitudeDeg: number; longitudeDeg: number; altitudeM: number };
	/** Of local standard time, east positive. */
	utcOffsetHours: number;
	rows: WeatherRow[];
}

/** The sun in the middle of a row's hour. */
export function midHourSun(weather: WeatherYear, row: WeatherRow) {
	return sunPosition(row.startMs + 1800000, weather.place.latitudeDeg, weather.place.longitudeDeg);
}

/** Month 0..11 and hour 0..23 of local standard time in which a row begins. */
export function localMonthHour(weather: WeatherYear, row: WeatherRow): { month: number; hour: number } {
	const local = new Date(row.startMs + weather.utcOffsetHours * 3600000);
	return { month: local.getUTCMonth(), hour: local.getUTCHours() };
}

export interface WeatherSums {
	hours: number;
	/** kWh/m²; missing hours count as nothing. */
	ghi: number;
	dni: number;
	dhi: number;
	/** January first, kWh/m². */
	monthlyGhi: number[];
	monthlyDni: number[];
	monthlyDhi: number[];
	/** Greatest hour, W/m². */
	mostGhi: number;
	mostDni: number;
	/** Means of the hours that have a value; null when none has. */
	meanTempC: number | null;
	meanWindMs: number | null;
	/** Hours without one of the three irradiances. */
	missingHours: number;
}

/** Sums and means of a weather file, months by local standard time. */
export function weatherSums(weather: WeatherYear): WeatherSums {
	const monthlyGhi = Array<number>(12).fill(0);
	const monthlyDni = Array<number>(12).fill(0);
	const monthlyDhi = Array<number>(12).fill(0);
	let mostGhi = 0;
	let mostDni = 0;
	let missingHours = 0;
	for (const row of weather.rows) {
		const { month } = localMonthHour(weather, row);
		monthlyGhi[month] += (row.ghi ?? 0) / 1000;
		monthlyDni[month] += (row.dni ?? 0) / 1000;
		monthlyDhi[month] += (row.dhi ?? 0) / 1000;
		mostGhi = Math.max(mostGhi, row.ghi ?? 0);
		mostDni = Math.max(mostDni, row.dni ?? 0);
		if (row.ghi === null || row.dni === null || row.dhi === null) missingHours += 1;
	}
	const total = (values: number[]) => values.reduce((sum, value) => sum + value, 0);
	return {
		hours: weather.rows.length,
		ghi: total(monthlyGhi),
		dni: total(monthlyDni),
		dhi: total(monthlyDhi),
		monthlyGhi,
		monthlyDni,
		monthlyDhi,
		mostGhi,
		mostDni,
		meanTempC: meanOf(weather.rows, 'tempC'),
		meanWindMs: meanOf(weather.rows, 'windMs'),
		missingHours
	};
}

function meanOf(rows: readonly WeatherRow[], field: 'tempC' | 'windMs'): number | null {
	let sum = 0;
	let count = 0;
	for (const row of rows) {
		const value = row[field];
		if (value === null) continue;
		sum += value;
		count += 1;
	}
	return count > 0 ? sum / count : null;
}

export interface Closure {
	/** Of global - (diffuse + direct x cos z), W/m². */
	meanWm2: number;
	rmsWm2: number;
	/** Greatest distance from zero. */
	maxWm2: number;
	/** Hours counted. */
	hours: number;
}

/**
 * How well a file's three irradiances agree with the sun of mid-hour: global - (diffuse + direct x cos z) in hours of
 * more than 50 W/m² global. A few watts say that hours, time zone and place are read rightly; tens of watts say that one
 * of them is wrong. `shiftHours` moves the sun's clock, to find by how much. The sun is the apparent one; `airless` leaves refraction
 * out, as many programs do. Null without an hour to count.
 */
export function weatherClosure(weather: WeatherYear, shiftHours = 0, airless = false): Closure | null {
	const { latitudeDeg, longitudeDeg } = weather.place;
	let sum = 0;
	let squares = 0;
	let max = 0;
	let hours = 0;
	for (const { startMs, ghi, dni, dhi } of weather.rows) {
		if (ghi === null || dni === null || dhi === null || !(ghi > 50)) continue;
		const sun = sunPosition(startMs + (0.5 + shiftHours) * 3600000, latitudeDeg, longitudeDeg);
		const elevationDeg = airless ? sun.elevationDeg : sun.apparentElevationDeg;
		const cosZenith = Math.max(0, Math.sin(elevationDeg * RADIANS_PER_DEGREE));
		const rest = ghi - (dhi + dni * cosZenith);
		sum += rest;
		squares += rest * rest;
		max = Math.max(max, Math.abs(rest));
		hours += 1;
	}
	if (hours === 0) return null;
	return { meanWm2: sum / hours, rmsWm2: Math.sqrt(squares / hours), maxWm2: max, hours };
}
