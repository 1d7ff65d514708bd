import { CORE_VERSION } from '../../core';
import { passes, type Extent } from '../check';
import type { MeasuredCheck, MethodReport } from '../report';
import { checks } from './index';

/** An infinite distance does not survive JSON. */
const finite = (value: number): number => (Number.isFinite(value) ? value : Number.MAX_VALUE);

/** Measures every check and tells what was found, failures too. */
export function measureAll(extent: Extent, measuredAt: string): MethodReport {
	return {
		coreVersion: CORE_VERSION,
		measuredAt,
		checks: checks.map((check): MeasuredCheck => {
			const { measure, ...words } = check;
			const measured = measure(extent);
			return {
				...words,
				...measured,
				worst: finite(measured.worst),
				mean: finite(measured.mean),
				passes: passes(check, measured)
			};
		})
	};
}
