/** What was measured when the application was built: plain data for the page. */
import type { Check, Measured } from './check';

export type MeasuredCheck = Omit<Check, 'measure'> & Measured & { passes: boolean };

export interface MethodReport {
	coreVersion: string;
	/** ISO moment, UTC, of the measurement. */
	measuredAt: string;
	checks: MeasuredCheck[];
}
