import { requireUser } from '$lib/server/guard';
import type { LayoutServerLoad } from './$types';

export const load: LayoutServerLoad = (event) => {
	const { userId } = requireUser(event);
	return {
		user: { id: userId, name: event.locals.user?.name ?? '', email: event.locals.user?.email ?? '' }
	};
};
