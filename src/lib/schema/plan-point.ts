import { z } from 'zod';
import { quantity } from './quantity';

/** Furthest that anything of a plot may lie from the origin, metres. */
export const MAX_REACH_M = 20_000;

export const eastShape = quantity(-MAX_REACH_M, MAX_REACH_M, 'm east');
export const northShape = quantity(-MAX_REACH_M, MAX_REACH_M, 'm north');

export const planPointSchema = z.tuple([eastShape, northShape], {
	error: 'Give a point as [eastM, northM].'
});
