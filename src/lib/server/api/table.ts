import { accountCalls } from './table-account';
import { computeCalls } from './table-compute';
import { projectCalls } from './table-project';
import { runCalls } from './table-run';
import type { CallSpec } from './spec';

/** Every call under `/api/v1`, by its operation id. Validation, the OpenAPI document and the access tests read this table. */
export const apiCalls = { ...accountCalls, ...projectCalls, ...runCalls, ...computeCalls };

export type OperationId = keyof typeof apiCalls;

export function allCalls(): [OperationId, CallSpec][] {
	return Object.entries(apiCalls) as [OperationId, CallSpec][];
}
