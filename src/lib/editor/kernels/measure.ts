import type { PlanPoint } from '$lib/core';

export interface Measured {
	distanceM: number;
	/** Clockwise from true north, 0..360; 0 for two equal points. */
	bearingDeg: number;
	eastM: number;
	northM: number;
}

/** Horizontal distance and bearing from one point to another. */
export function measure(from: PlanPoint, to: PlanPoint): Measured {
	const eastM = to[0] - from[0];
	const northM = to[1] - from[1];
	const bearingDeg = ((Math.atan2(eastM, northM) * 180) / Math.PI + 360) % 360;
	return { distanceM: Math.hypot(eastM, northM), bearingDeg, eastM, northM };
}
