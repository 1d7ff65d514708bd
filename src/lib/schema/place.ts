import { z } from 'zod';
import type { Place } from '../core/document';
import { quantity } from './quantity';

/** True for a time zone name that this machine's time zone data knows. */
export function isTimeZone(name: string): boolean {
	try {
		new Intl.DateTimeFormat('en', { timeZone: name });
		return true;
	} catch (error) {
		if (error instanceof RangeError) return false;
		throw error;
	}
}

export const timeZoneSchema = z
	.string({ error: 'Give a time zone name such as Europe/Rome.' })
	.min(1, { error: 'Give a time zone name such as Europe/Rome.' })
	.max(64, { error: 'Give a time zone name such as Europe/Rome.' })
	.refine(isTimeZone, { error: 'This time zone is not known. Give a name such as Europe/Rome.' });

const latitudeDeg = quantity(-90, 90, 'degrees, north positive');
const longitudeDeg = quantity(-180, 180, 'degrees, east positive');
const altitudeM = quantity(-450, 6500, 'm above sea level');
const magneticDeclinationDeg = quantity(-180, 180, 'degrees, east positive');

export const placeSchema = z.strictObject({
	latitudeDeg,
	longitudeDeg,
	altitudeM,
	timeZone: timeZoneSchema,
	magneticDeclinationDeg
}) satisfies z.ZodType<Place>;

/** A place as it comes in: what is left out is found (time zone) or taken as 0. */
export const newPlaceSchema = z.strictObject({
	latitudeDeg,
	longitudeDeg,
	altitudeM: altitudeM.default(0),
	timeZone: timeZoneSchema.optional(),
	magneticDeclinationDeg: magneticDeclinationDeg.default(0)
});
export type NewPlace = z.input<typeof newPlaceSchema>;
