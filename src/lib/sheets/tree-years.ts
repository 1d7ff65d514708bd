import { treeHeightM, type Obstacle } from '../core';
import { formatNumber } from '../i18n';

/** `trees 10 years older`: how the trees of a shade run differ from those of today. */
export function treesInWords(years: number): string {
	return `trees ${formatNumber(years)} ${years === 1 ? 'year' : 'years'} older`;
}

/** `trees 10 years older: 12.00 m`, a range for several trees; null when the run's trees are those of today. */
export function grownTreesInWords(obstacles: Obstacle[], years: number): string | null {
	if (years <= 0) return null;
	const heights = obstacles.flatMap((each) => (each.kind === 'tree' ? [treeHeightM(each, years)] : []));
	if (heights.length === 0) return null;
	const [least, most] = [Math.min(...heights), Math.max(...heights)].map((each) => formatNumber(each, 2));
	return `${treesInWords(years)}: ${least === most ? least : `${least}–${most}`} m`;
}
