import tzLookup from '@photostructure/tz-lookup';
import { isTimeZone } from '$lib/schema/place';

/** The time zone at a place by a world map that is good to some kilometres; the sea has zones by longitude. */
export function findTimeZone(latitudeDeg: number, longitudeDeg: number): string {
	const found = tzLookup(latitudeDeg, longitudeDeg);
	return isTimeZone(found) ? found : 'UTC';
}
