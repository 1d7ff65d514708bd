import type { RunInput } from '../results';
import { fieldSunHidden, type Field } from '../field';
import { SunSky } from '../run/sun-steps';
import { solarHour } from '../sun/position';

/** A moment with beam on the plot. */
export interface AnswerSun {
	azimuthDeg: number;
	/** Apparent. */
	elevationDeg: number;
	/** Beam on a plane square to it, kWh/m², of the step and of all the days that it stands for. */
	kwh: number;
	/** 1..366. */
	dayOfYear: number;
	/** Month 0..11 and hour 0..23 of the site's standard time. */
	month: number;
	hour: number;
	morning: boolean;
}

const DAY_MS = 86400000;

/**
 * The suns above horizon and skyline of one day in every `everyDays` of the input's year, at mid-interval steps; each
 * day stands for the days around it. Beam as in the year run.
 */
export function answerSuns(
	field: Field,
	input: RunInput,
	everyDays: number
): { suns: AnswerSun[]; days: number } {
	const sky = new SunSky(input.place);
	const offsetMs = input.utcOffsetMinutes * 60000;
	const stepMs = input.stepMinutes * 60000;
	const startMs = Date.UTC(input.year, 0, 1) - offsetMs;
	const endMs = Date.UTC(input.year + 1, 0, 1) - offsetMs;
	const suns: AnswerSun[] = [];
	const length = Math.round((endMs - startMs) / DAY_MS);
	// Blocks of days as even as whole days allow, each looked at on its middle day and counted by its length.
	const days = Math.max(1, Math.round(length / everyDays));
	for (let block = 0; block < days; block++) {
		const first = Math.round((block * length) / days);
		const stands = Math.round(((block + 1) * length) / days) - first;
		const day = first + Math.floor(stands / 2);
		const dayMs = startMs + day * DAY_MS;
		for (let timeMs = dayMs + stepMs / 2; timeMs < dayMs + DAY_MS; timeMs += stepMs) {
			const sun = sky.at(timeMs);
			if (sun.elevationDeg <= 0 || fieldSunHidden(field, sun)) continue;
			const local = new Date(timeMs + offsetMs);
			suns.push({
				azimuthDeg: sun.azimuthDeg,
				elevationDeg: sun.elevationDeg,
				kwh: (stands * sun.beam * input.stepMinutes) / 60 / 1000,
				dayOfYear: day + 1,
				month: local.getUTCMonth(),
				hour: local.getUTCHours(),
				morning: solarHour(timeMs, input.place.longitudeDeg) < 12
			});
		}
	}
	return { suns, days };
}
