import { z } from 'zod';
import type { Obstacle, PlanPoint } from '../core/document';
import { isConvex } from '../core/geometry/convex-parts';
import { eastShape, northShape } from './plan-point';
import { idSchema, optionalLabel, quantity, wholeNumber } from './quantity';
import { SAME_POINT_M } from './plot-checks';
import { ringProblem } from './ring';

export const MAX_FOOTPRINT_CORNERS = 60;
export const MAX_WALL_POINTS = 200;
/** Furthest that a corner may lie from the obstacle's own place, metres. */
export const MAX_OFFSET_M = 2_000;

const offset = quantity(-MAX_OFFSET_M, MAX_OFFSET_M, 'm from the obstacle’s place');
const offsetPoint = z.tuple([offset, offset], {
	error: 'Give a corner as [eastM, northM] from the obstacle’s place.'
}) satisfies z.ZodType<PlanPoint>;

const boxSchema = z.strictObject({
	id: idSchema,
	kind: z.literal('box'),
	name: optionalLabel(80),
	eastM: eastShape,
	northM: northShape,
	sizeXM: quantity(0.01, 2000, 'm'),
	sizeYM: quantity(0.01, 2000, 'm'),
	heightM: quantity(0.01, 300, 'm'),
	turnDeg: quantity(-360, 360, 'degrees')
});

const treeSchema = z
	.strictObject({
		id: idSchema,
		kind: z.literal('tree'),
		name: optionalLabel(80),
		eastM: eastShape,
		northM: northShape,
		heightM: quantity(0.1, 120, 'm'),
		crownBaseM: quantity(0, 119, 'm'),
		crownRadiusM: quantity(0.05, 40, 'm'),
		trunkRadiusM: quantity(0, 5, 'm'),
		crownTransmission: quantity(0, 1),
		growthMPerYear: quantity(0, 5, 'm a year'),
		maxHeightM: quantity(0.1, 120, 'm'),
		crownShape: z
			.enum(['cylinder', 'cone', 'ellipsoid'], {
				error: 'Give the crown as "cylinder", "cone" or "ellipsoid".'
			})
			.optional(),
		leafTransmission: quantity(0, 1).optional(),
		leafDays: z
			.tuple([wholeNumber(1, 366), wholeNumber(1, 366)], {
				error: 'Give the days in leaf as [first, last], days of the year from 1 to 366.'
			})
			.optional()
	})
	.superRefine((tree, context) => {
		if (tree.crownBaseM >= tree.heightM) {
			context.addIssue({
				code: 'custom',
				path: ['crownBaseM'],
				message: 'The crown must begin below the top of the tree.'
			});
		}
		if (tree.leafDays && tree.leafTransmission === undefined) {
			context.addIssue({
				code: 'custom',
				path: ['leafTransmission'],
				message: 'Give the light through the crown in leaf too, or leave the days in leaf out.'
			});
		}
		if (tree.maxHeightM < tree.heightM) {
			context.addIssue({
				code: 'custom',
				path: ['maxHeightM'],
				message: 'The full-grown height must be at least the height of today.'
			});
		}
	});

/** Why corners make no footprint, in a sentence, or null. */
export function footprintProblem(corners: PlanPoint[]): string | null {
	return ringProblem(corners, 'The footprint');
}

export const NOT_CONVEX =
	'A pitched roof needs a footprint without inward corners: choose a flat roof, or make a building of each wing.';

const roofSchema = z.discriminatedUnion(
	'kind',
	[
		z.strictObject({ kind: z.literal('flat') }),
		z.strictObject({
			kind: z.literal('pitched'),
			riseM: quantity(0.01, 60, 'm'),
			ridgeDeg: quantity(0, 360, 'degrees clockwise from true north')
		})
	],
	{ error: 'Give the roof as "flat" or "pitched".' }
);

const buildingSchema = z
	.strictObject({
		id: idSchema,
		kind: z.literal('building'),
		name: optionalLabel(80),
		eastM: eastShape,
		northM: northShape,
		corners: z
			.array(offsetPoint, { error: 'Give the footprint as a list of [eastM, northM].' })
			.max(MAX_FOOTPRINT_CORNERS, {
				error: `Keep a footprint within ${MAX_FOOTPRINT_CORNERS} corners: simplify it.`
			}),
		heightM: quantity(0.1, 300, 'm'),
		roof: roofSchema
	})
	.superRefine((building, context) => {
		if (building.corners.length > MAX_FOOTPRINT_CORNERS) return;
		const problem = footprintProblem(building.corners);
		if (problem) context.addIssue({ code: 'custom', path: ['corners'], message: problem });
		else if (building.roof.kind === 'pitched' && !isConvex(building.corners)) {
			context.addIssue({ code: 'custom', path: ['roof'], message: NOT_CONVEX });
		}
	});

/** Why points make no line of a wall, in a sentence, or null. */
export function wallLineProblem(line: PlanPoint[]): string | null {
	if (line.length < 2) return 'The line needs two points or more.';
	const same = line.findIndex(
		(p, k) => k > 0 && Math.hypot(p[0] - line[k - 1][0], p[1] - line[k - 1][1]) < SAME_POINT_M
	);
	return same < 0 ? null : `The line has points ${same} and ${same + 1} at the same place: take one out.`;
}

const wallSchema = z
	.strictObject({
		id: idSchema,
		kind: z.literal('wall'),
		name: optionalLabel(80),
		eastM: eastShape,
		northM: northShape,
		line: z
			.array(offsetPoint, { error: 'Give the line as a list of [eastM, northM].' })
			.max(MAX_WALL_POINTS, { error: `Keep a line within ${MAX_WALL_POINTS} points: simplify it.` }),
		heightM: quantity(0.01, 100, 'm'),
		thicknessM: quantity(0.005, 20, 'm'),
		transmission: quantity(0, 1)
	})
	.superRefine((wall, context) => {
		const problem = wallLineProblem(wall.line);
		if (problem) context.addIssue({ code: 'custom', path: ['line'], message: problem });
	});

const mastSchema = z.strictObject({
	id: idSchema,
	kind: z.literal('mast'),
	name: optionalLabel(80),
	eastM: eastShape,
	northM: northShape,
	heightM: quantity(0.1, 300, 'm'),
	radiusM: quantity(0.005, 20, 'm')
});

export const obstacleSchema = z.discriminatedUnion(
	'kind',
	[boxSchema, treeSchema, buildingSchema, wallSchema, mastSchema],
	{ error: 'Give an obstacle of kind "box", "tree", "building", "wall" or "mast".' }
) satisfies z.ZodType<Obstacle>;
