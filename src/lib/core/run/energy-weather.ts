import type { WeatherRow, WeatherYear } from '../energy/weather-year';
import type { EnergySky } from '../results';

type WeatherSky = Extract<EnergySky, { source: 'weather' }>;

const HOUR_MS = 3600000;

/** Hours of a weather file as a run keeps them: runs of hours without a gap, and bare columns. */
export function weatherSky(weather: WeatherYear): WeatherSky {
	const spans: WeatherSky['spans'] = [];
	for (const { startMs } of weather.rows) {
		const last = spans.at(-1);
		if (last && startMs === last.startMs + last.hours * HOUR_MS) last.hours++;
		else spans.push({ startMs, hours: 1 });
	}
	return {
		source: 'weather',
		name: weather.place.name,
		latitudeDeg: weather.place.latitudeDeg,
		longitudeDeg: weather.place.longitudeDeg,
		altitudeM: weather.place.altitudeM,
		utcOffsetHours: weather.utcOffsetHours,
		spans,
		ghi: weather.rows.map((row) => row.ghi),
		dni: weather.rows.map((row) => row.dni),
		dhi: weather.rows.map((row) => row.dhi)
	};
}

/** The same hours with their times, as the weather readers give them. */
export function weatherYearOf(sky: WeatherSky): WeatherYear {
	const rows: WeatherRow[] = [];
	for (const { startMs, hours } of sky.spans) {
		for (let h = 0; h < hours; h++) {
			const k = rows.length;
			rows.push({
				startMs: startMs + h * HOUR_MS,
				ghi: sky.ghi[k] ?? null,
				dni: sky.dni[k] ?? null,
				dhi: sky.dhi[k] ?? null,
				tempC: null,
				windMs: null
			});
		}
	}
	return {
		place: {
			name: sky.name,
			latitudeDeg: sky.latitudeDeg,
			longitudeDeg: sky.longitudeDeg,
			altitudeM: sky.altitudeM
		},
		utcOffsetHours: sky.utcOffsetHours,
		rows
	};
}
