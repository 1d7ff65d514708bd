import { z } from 'zod';
import type { BoundaryPart, Ground, Obstacle, Plot, SkylinePoint } from '../core/document';
import { idSchema, optionalLabel, quantity } from './quantity';
import { strayHole } from './plot-checks';
import { ringProblem } from './ring';

/** Furthest that anything of a plot may lie from the origin, metres. */
export const MAX_REACH_M = 20_000;
export const MAX_BOUNDARY_CORNERS = 5_000;
export const MAX_OBSTACLES = 500;
export const MAX_SKYLINE_POINTS = 3_600;

const eastM = quantity(-MAX_REACH_M, MAX_REACH_M, 'm east');
const northM = quantity(-MAX_REACH_M, MAX_REACH_M, 'm north');

export const planPointSchema = z.tuple([eastM, northM], { error: 'Give a point as [eastM, northM].' });

const ringSchema = z
	.array(planPointSchema, { error: 'Give a ring as a list of [eastM, northM].' })
	.max(MAX_BOUNDARY_CORNERS, { error: `Keep a ring within ${MAX_BOUNDARY_CORNERS} corners: simplify it.` })
	.superRefine((ring, context) => {
		if (ring.length > MAX_BOUNDARY_CORNERS) return;
		const problem = ringProblem(ring);
		if (problem) context.addIssue({ code: 'custom', message: problem });
	});

export const boundaryPartSchema = z
	.strictObject({
		outer: ringSchema,
		holes: z.array(ringSchema).max(100, { error: 'Keep a part within 100 holes.' })
	})
	.superRefine((part, context) => {
		const stray = strayHole(part);
		if (stray !== null) {
			context.addIssue({
				code: 'custom',
				path: ['holes', stray - 1],
				message: 'The hole does not lie inside its outline: move it in or take it out.'
			});
		}
	}) satisfies z.ZodType<BoundaryPart>;

export const boundarySchema = z
	.array(boundaryPartSchema)
	.max(50, { error: 'Keep the boundary within 50 parts.' })
	.superRefine((parts, context) => {
		let corners = 0;
		for (const part of parts) {
			corners += part.outer.length;
			for (const hole of part.holes) corners += hole.length;
		}
		if (corners > MAX_BOUNDARY_CORNERS) {
			context.addIssue({
				code: 'custom',
				message: `The boundary has ${corners} corners; simplify it to at most ${MAX_BOUNDARY_CORNERS}.`
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
		})
	],
	{ error: 'Give the ground as "level" or "plane".' }
) satisfies z.ZodType<Ground>;

export const skylinePointSchema = z.strictObject({
	azimuthDeg: quantity(0, 360, 'degrees clockwise from true north'),
	elevationDeg: quantity(-30, 90, 'degrees above level')
}) satisfies z.ZodType<SkylinePoint>;

export const skylineSchema = z
	.array(skylinePointSchema)
	.max(MAX_SKYLINE_POINTS, { error: `Keep the skyline within ${MAX_SKYLINE_POINTS} points.` })
	.superRefine((points, context) => {
		for (let i = 1; i < points.length; i += 1) {
			if (points[i].azimuthDeg <= points[i - 1].azimuthDeg) {
				context.addIssue({
					code: 'custom',
					path: [i, 'azimuthDeg'],
					message: 'Sort the skyline by bearing, each bearing once.'
				});
				return;
			}
		}
	});

const boxSchema = z.strictObject({
	id: idSchema,
	kind: z.literal('box'),
	name: optionalLabel(80),
	eastM,
	northM,
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
		eastM,
		northM,
		heightM: quantity(0.1, 120, 'm'),
		crownBaseM: quantity(0, 119, 'm'),
		crownRadiusM: quantity(0.05, 40, 'm'),
		trunkRadiusM: quantity(0, 5, 'm'),
		crownTransmission: quantity(0, 1),
		growthMPerYear: quantity(0, 5, 'm a year'),
		maxHeightM: quantity(0.1, 120, 'm')
	})
	.superRefine((tree, context) => {
		if (tree.crownBaseM >= tree.heightM) {
			context.addIssue({
				code: 'custom',
				path: ['crownBaseM'],
				message: 'The crown must begin below the top of the tree.'
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

export const obstacleSchema = z.discriminatedUnion('kind', [boxSchema, treeSchema], {
	error: 'Give an obstacle of kind "box" or "tree".'
}) satisfies z.ZodType<Obstacle>;

export const plotSchema = z
	.strictObject({
		version: z.literal(1, { error: 'Give version 1.' }),
		boundary: boundarySchema,
		ground: groundSchema,
		skyline: skylineSchema,
		obstacles: z
			.array(obstacleSchema)
			.max(MAX_OBSTACLES, { error: `Keep obstacles within ${MAX_OBSTACLES}.` }),
		setBackM: quantity(0, 500, 'm')
	})
	.superRefine((plot, context) => {
		const seen = new Set<string>();
		plot.obstacles.forEach((obstacle, index) => {
			if (seen.has(obstacle.id)) {
				context.addIssue({
					code: 'custom',
					path: ['obstacles', index, 'id'],
					message: 'This id is used twice.'
				});
			}
			seen.add(obstacle.id);
		});
	}) satisfies z.ZodType<Plot>;

/** A plot with nothing on it yet: level ground, open sky. */
export function emptyPlot(): Plot {
	return {
		version: 1,
		boundary: [],
		ground: { kind: 'level', heightM: 0 },
		skyline: [],
		obstacles: [],
		setBackM: 3
	};
}
