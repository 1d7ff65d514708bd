import type { ServerInit } from '@sveltejs/kit';
import { seedDemo } from '$lib/server/demo';
import { seedsDemo } from '$lib/server/env';

export const init: ServerInit = async () => {
	if (seedsDemo()) await seedDemo();
};
