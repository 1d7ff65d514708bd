import type { Sheet } from './drawing';
import { coordinateSheets } from './coordinate-sheets';
import { mountSheets } from './mount-sheets';
import { obstacleSheets } from './obstacle-sheets';
import { openPointSheets } from './open-point-sheets';
import type { PlanContent } from './plan-content';
import { siteSheets } from './site-sheets';

/**
 * All sheets of a plan in their order: site and setting-out, coordinates, obstacles, mount drawings, open points.
 * The caller makes sure that there is at least one tracker.
 */
export function planSheets(content: PlanContent): Sheet[] {
	if (content.rows.length === 0) throw new RangeError('A plan needs at least one tracker.');
	const builders = [
		...siteSheets(content),
		...coordinateSheets(content),
		...obstacleSheets(content),
		...mountSheets(content),
		...openPointSheets(content)
	];
	return builders.map((build, i) => build({ number: i + 1, total: builders.length }));
}
