import { z } from 'zod';
import type { Ground, GroundPoint } from '../core/document';
import { eastShape, northShape } from './plan-point';
import { quantity, wholeNumber } from './quantity';

export const MAX_GROUND_POINTS = 20_000;
/** Heights of a raster, at most. */
export const MAX_RASTER_HEIGHTS = 60_000;
/** Points at one place (to the millimetre) may differ by this in height, metres; their mean is taken. */
const SAME_PLACE_M = 0.05;

const heightM = quantity(-1000, 9000, 'm');
const groundPointSchema = z.tuple([eastShape, northShape, heightM], {
	error: 'Give a height as [eastM, northM, heightM].'
}) satisfies z.ZodType<GroundPoint>;

export interface GroundFault {
	/** Index of the point, or null for all of them. */
	index: number | null;
	message: string;
}

const placeKey = (point: GroundPoint): string =>
	`${Math.round(point[0] * 1000) + 0} ${Math.round(point[1] * 1000) + 0}`;

/** Whether every point lies on one line, to the millimetre. */
function onOneLine(points: readonly GroundPoint[]): boolean {
	const [a] = points;
	const far = points.reduce((most, p) =>
		Math.hypot(p[0] - a[0], p[1] - a[1]) > Math.hypot(most[0] - a[0], most[1] - a[1]) ? p : most
	);
	const length = Math.hypot(far[0] - a[0], far[1] - a[1]);
	return points.every(
		(p) => Math.abs((far[0] - a[0]) * (p[1] - a[1]) - (far[1] - a[1]) * (p[0] - a[0])) <= 1e-3 * length
	);
}

/** Why measured points cannot make a ground, or null: too few places, two heights at one place, all on one line. */
export function groundFault(points: readonly GroundPoint[]): GroundFault | null {
	const seen = new Map<string, number>();
	for (const [index, point] of points.entries()) {
		const key = placeKey(point);
		const first = seen.get(key);
		if (first === undefined) {
			seen.set(key, index);
			continue;
		}
		const apart = Math.abs(points[first][2] - point[2]);
		if (apart <= SAME_PLACE_M) continue;
		return {
			index,
			message: `Heights ${first + 1} and ${index + 1} stand at the same place and differ by ${apart.toFixed(2)} m: take one out.`
		};
	}
	if (seen.size < 3) return { index: null, message: 'Give heights at three places or more.' };
	if (onOneLine(points))
		return {
			index: null,
			message: 'All heights lie on one line: give some to its sides, or choose a sloping plane.'
		};
	return null;
}

const pointsSchema = z
	.array(groundPointSchema, { error: 'Give the heights as a list of [eastM, northM, heightM].' })
	.max(MAX_GROUND_POINTS, {
		error: `Keep the ground within ${MAX_GROUND_POINTS} heights: thin them out.`
	})
	.superRefine((points, context) => {
		if (points.length > MAX_GROUND_POINTS) return;
		const fault = groundFault(points);
		if (fault)
			context.addIssue({
				code: 'custom',
				path: fault.index === null ? [] : [fault.index],
				message: fault.message
			});
	});

const rasterSchema = z
	.strictObject({
		kind: z.literal('raster'),
		westM: eastShape,
		southM: northShape,
		cellM: quantity(0.1, 1000, 'm'),
		columns: wholeNumber(2, 2000),
		rows: wholeNumber(2, 2000),
		heightsM: z
			.array(heightM.nullable(), { error: 'Give the heights as a list, row by row from the south.' })
			.max(MAX_RASTER_HEIGHTS, {
				error: `Keep a raster within ${MAX_RASTER_HEIGHTS} heights: take larger cells.`
			})
	})
	.superRefine((raster, context) => {
		const { columns, rows, cellM, heightsM } = raster;
		const wanted = columns * rows;
		if (heightsM.length !== wanted) {
			context.addIssue({
				code: 'custom',
				path: ['heightsM'],
				message: `${columns} columns and ${rows} rows make ${wanted} heights; ${heightsM.length} are given.`
			});
			return;
		}
		const gaps = heightsM.reduce((count: number, height) => count + (height === null ? 1 : 0), 0);
		if (gaps > wanted / 2) {
			context.addIssue({
				code: 'custom',
				path: ['heightsM'],
				message: `${gaps} of ${wanted} heights are gaps: at most half can be filled from their neighbours.`
			});
		}
		const ends = [raster.westM + (columns - 1) * cellM, raster.southM + (rows - 1) * cellM];
		if (!eastShape.safeParse(ends[0]).success || !northShape.safeParse(ends[1]).success) {
			context.addIssue({
				code: 'custom',
				path: ['cellM'],
				message: 'The raster runs off the plan: take smaller cells or fewer.'
			});
		}
	});

export const groundSchema = z.discriminatedUnion(
	'kind',
	[
		z.strictObject({ kind: z.literal('level'), heightM: quantity(-1000, 1000, 'm') }),
		z.strictObject({
			kind: z.literal('plane'),
			heightM: quantity(-1000, 1000, 'm'),
			risePercent: quantity(0, 60, 'm of rise per 100 m'),
			riseTowardsDeg: quantity(0, 360, 'degrees clockwise from true north')
		}),
		z.strictObject({ kind: z.literal('points'), points: pointsSchema }),
		rasterSchema
	],
	{ error: 'Give the ground as "level", "plane", "points" or "raster".' }
) satisfies z.ZodType<Ground>;
