import { RADIANS_PER_DEGREE } from '../conventions';
import type { Ground } from '../document';

/** Height of the ground at a plan point, metres above the origin's datum. */
export function groundHeightM(ground: Ground, eastM: number, northM: number): number {
	if (ground.kind === 'level') return ground.heightM;
	const towards = ground.riseTowardsDeg * RADIANS_PER_DEGREE;
	const along = eastM * Math.sin(towards) + northM * Math.cos(towards);
	return ground.heightM + (ground.risePercent / 100) * along;
}

/** Rise of the ground in metres per metre, without its direction. */
export function groundGradient(ground: Ground): number {
	return ground.kind === 'level' ? 0 : Math.abs(ground.risePercent) / 100;
}
