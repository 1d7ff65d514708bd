import { eq, inArray } from 'drizzle-orm';
import { afterAll, expect, it } from 'vitest';
import { stopPool } from '$lib/server/compute/pool';
import { db } from '$lib/server/db';
import { plans, projectMembers, projects, teams, users } from '$lib/server/db/schema';
import { seedDemo } from '$lib/server/demo';
import { startJobs, stopJobs } from '$lib/server/jobs';
import { useTemporaryDatabase } from './helpers/temporary-database';

useTemporaryDatabase();

afterAll(async () => {
	await stopJobs();
	await stopPool();
});

it('the demo is put in once by two servers that start at the same moment, and not again after it was deleted', async () => {
	startJobs();
	await Promise.all([seedDemo(), seedDemo()]);
	await expect.poll(async () => (await db.select().from(plans)).length, { timeout: 60_000 }).toBe(1);
	await seedDemo();
	const people = await db
		.select({ id: users.id, email: users.email })
		.from(users)
		.where(
			inArray(
				users.email,
				['owner', 'designer', 'crew', 'client'].map((role) => `${role}@tiltyard.test`)
			)
		);
	expect(people).toHaveLength(4);
	expect(await db.select().from(teams)).toHaveLength(1);
	const [project, ...others] = await db.select().from(projects);
	expect(others).toEqual([]);
	expect(await db.select().from(projectMembers)).toHaveLength(2);
	expect((await db.select().from(plans))[0].revisionLetter).toBe('A');

	await db.delete(projects).where(eq(projects.id, project.id));
	await seedDemo();
	expect(await db.select().from(projects)).toEqual([]);
}, 120_000);
