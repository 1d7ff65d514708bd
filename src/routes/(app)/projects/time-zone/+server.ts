import { json } from '@sveltejs/kit';
import { parseCoordinates } from '$lib/i18n';
import { AppError, problemResponse } from '$lib/server/errors';
import { findTimeZone } from '$lib/server/projects/find-time-zone';
import type { RequestHandler } from './$types';

/** The time zone at a place, for the form of a project: `?at=41.2, 14.5` in any notation that the form takes. */
export const GET: RequestHandler = ({ locals, url }) => {
	if (!locals.actor) return problemResponse(new AppError('unauthorised', 'Sign in first.'));
	const place = parseCoordinates(url.searchParams.get('at') ?? '');
	if (!place.ok) {
		const errors = [{ path: 'at', message: place.message }];
		return problemResponse(new AppError('invalid', 'The place could not be read.', { errors }));
	}
	return json({ timeZone: findTimeZone(place.latitudeDeg, place.longitudeDeg) });
};
