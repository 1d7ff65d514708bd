import type { Place } from '../document';
import { averageYear } from '../energy/average-year';
import type { EnergySettings } from '../results';
import { dayStepMinutes, placesApartKm } from './energy-steps';

/** A weather file from further away than this is refused, km. */
const FARTHEST_KM = 500;

/** Why an energy year cannot be computed from settings: the field below `energy`, what is wrong and what to do. */
export interface EnergyRefusal {
	path: string;
	message: string;
}

/** The first thing that keeps a place's energy year from being computed from these settings; null when nothing does. */
export function checkEnergy(
	place: Place,
	settings: EnergySettings,
	stepMinutes: number
): EnergyRefusal | null {
	const { sky } = settings;
	if (sky.source === 'average') {
		const year = averageYear(place.latitudeDeg, sky.monthlyHorizontalKwhM2, dayStepMinutes(stepMinutes));
		if (year.ok) return null;
		const at = year.month === null ? '' : `.${year.month}`;
		return { path: `sky.monthlyHorizontalKwhM2${at}`, message: `${year.message} ${year.remedy}` };
	}
	if (sky.source !== 'weather') return null;
	const hours = sky.spans.reduce((sum, span) => sum + span.hours, 0);
	if (hours !== 8760 && hours !== 8784) {
		return {
			path: 'sky.spans',
			message: `The weather has ${hours} hours; a year has 8760, or 8784 with a leap day. Give the hours of one whole year.`
		};
	}
	for (const column of ['ghi', 'dni', 'dhi'] as const) {
		if (sky[column].length !== hours) {
			return {
				path: `sky.${column}`,
				message: `There are ${sky[column].length} values for ${hours} hours. Give one for each hour, null where the file has none.`
			};
		}
	}
	const apart = placesApartKm(place, sky);
	if (apart > FARTHEST_KM) {
		return {
			path: 'sky.latitudeDeg',
			message: `The weather was made for a place ${Math.round(apart)} km from this one. Give weather from within ${FARTHEST_KM} km, or mend the signs of latitude and longitude.`
		};
	}
	return null;
}
