/**
 * Undo and redo as plain data: each step keeps the state before and after it. States are never changed in place,
 * so neighbouring steps share everything that an edit left alone and a long history stays small.
 */

export interface HistoryStep<S> {
	/** What the edit did, in the words of the button that did it: "Move B04". */
	label: string;
	before: S;
	after: S;
	/** Steps in a row with the same key, close in time, become one step (key nudges, for example). */
	mergeKey: string | null;
	atMs: number;
}

export interface History<S> {
	done: readonly HistoryStep<S>[];
	undone: readonly HistoryStep<S>[];
}

export const historyLimit = 200;
const mergeWindowMs = 1200;

export function emptyHistory<S>(): History<S> {
	return { done: [], undone: [] };
}

/** Adds a step and forgets what could be redone; merges it into the last step when their merge keys agree. */
export function recordStep<S>(history: History<S>, step: HistoryStep<S>): History<S> {
	const last = history.done.at(-1);
	const merges =
		last !== undefined &&
		step.mergeKey !== null &&
		last.mergeKey === step.mergeKey &&
		step.atMs - last.atMs <= mergeWindowMs;
	const done = merges
		? [...history.done.slice(0, -1), { ...step, before: last.before }]
		: [...history.done, step].slice(-historyLimit);
	return { done, undone: [] };
}

/** The state before the last step, or null when nothing can be undone. */
export function undoStep<S>(history: History<S>): { history: History<S>; state: S; label: string } | null {
	const last = history.done.at(-1);
	if (!last) return null;
	return {
		history: { done: history.done.slice(0, -1), undone: [...history.undone, last] },
		state: last.before,
		label: last.label
	};
}

/** The state after the step that was undone last, or null when nothing can be redone. */
export function redoStep<S>(history: History<S>): { history: History<S>; state: S; label: string } | null {
	const next = history.undone.at(-1);
	if (!next) return null;
	return {
		history: { done: [...history.done, next], undone: history.undone.slice(0, -1) },
		state: next.after,
		label: next.label
	};
}
