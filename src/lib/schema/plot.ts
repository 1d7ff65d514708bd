import { z } from 'zod';
import type { BoundaryPart, Plot, SkylinePoint } from '../core/document';
import { groundSchema } from './ground';
import { obstacleSchema } from './obstacle';
import { planPointSchema } from './plan-point';
import { strayHole } from './plot-checks';
import { quantity } from './quantity';
import { ringProblem } from './ring';

export { MAX_REACH_M, planPointSchema } from './plan-point';
export * from './ground';
export * from './obstacle';

export const MAX_BOUNDARY_CORNERS = 5_000;
export const MAX_OBSTACLES = 500;
export const MAX_SKYLINE_POINTS = 3_600;

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

/** Corners of all buildings and points of all walls of a plot, at most. */
export const MAX_OBSTACLE_CORNERS = 5_000;

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
		const corners = plot.obstacles.reduce(
			(sum, each) =>
				sum + (each.kind === 'building' ? each.corners.length : each.kind === 'wall' ? each.line.length : 0),
			0
		);
		if (corners > MAX_OBSTACLE_CORNERS) {
			context.addIssue({
				code: 'custom',
				path: ['obstacles'],
				message: `Buildings and walls have ${corners} corners in all; simplify them to at most ${MAX_OBSTACLE_CORNERS}.`
			});
		}
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
