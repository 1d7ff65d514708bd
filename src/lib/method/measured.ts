import report from 'virtual:measured-checks';
import type { MethodReport } from './report';

/** What was measured when the application was built; under development, when it was first asked for. */
export const measuredReport: MethodReport = report;
