import { describe, expect, it } from 'vitest';
import { emptyHistory, historyLimit, recordStep, redoStep, undoStep, type History } from './history';

function step(before: number, after: number, mergeKey: string | null = null, atMs = 0) {
	return { label: `to ${after}`, before, after, mergeKey, atMs };
}

describe('history', () => {
	it('goes back and forth through the steps in order', () => {
		let history: History<number> = emptyHistory();
		history = recordStep(history, step(0, 1));
		history = recordStep(history, step(1, 2));
		const back = undoStep(history);
		expect(back?.state).toBe(1);
		expect(back?.label).toBe('to 2');
		const further = undoStep(back!.history);
		expect(further?.state).toBe(0);
		expect(undoStep(further!.history)).toBeNull();
		const forth = redoStep(further!.history);
		expect(forth?.state).toBe(1);
		expect(redoStep(redoStep(forth!.history)!.history)).toBeNull();
	});

	it('forgets what was undone once something new is done', () => {
		let history: History<number> = recordStep(emptyHistory<number>(), step(0, 1));
		history = undoStep(history)!.history;
		history = recordStep(history, step(0, 5));
		expect(redoStep(history)).toBeNull();
		expect(undoStep(history)?.state).toBe(0);
	});

	it('merges quick steps of one key into one, and keeps slow ones apart', () => {
		let history: History<number> = emptyHistory();
		history = recordStep(history, step(0, 1, 'nudge', 1000));
		history = recordStep(history, step(1, 2, 'nudge', 1200));
		expect(history.done).toHaveLength(1);
		expect(undoStep(history)?.state).toBe(0);
		history = recordStep(history, step(2, 3, 'nudge', 9000));
		expect(history.done).toHaveLength(2);
	});

	it('never merges steps that have no key', () => {
		let history: History<number> = emptyHistory();
		history = recordStep(history, step(0, 1));
		history = recordStep(history, step(1, 2));
		expect(history.done).toHaveLength(2);
	});

	it('keeps a bounded number of steps', () => {
		let history: History<number> = emptyHistory();
		for (let i = 0; i < historyLimit + 50; i += 1) history = recordStep(history, step(i, i + 1));
		expect(history.done).toHaveLength(historyLimit);
		expect(history.done[0].before).toBe(50);
	});
});
