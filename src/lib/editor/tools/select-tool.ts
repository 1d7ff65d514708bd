import type { Layout, PlanPoint } from '$lib/core';
import type { Editor } from '../editor.svelte';
import { alignPoint } from '../kernels/align';
import { shiftTrackers } from '../kernels/layout-edit';
import { boxOf, idsInBox, selectionAfterClick } from '../kernels/pick';
import { hasMoved, type GroundPointer, type Tool } from './tool';

type State =
	| { kind: 'idle' }
	| { kind: 'pressed'; start: PlanPoint; hitId: string; shift: boolean }
	| { kind: 'moving'; start: PlanPoint; hitId: string; ids: Set<string>; before: Layout; label: string }
	| { kind: 'boxing'; start: PlanPoint; before: string[] };

/** Select by click, shift-click or box; move what is selected by dragging it. */
export class SelectTool implements Tool {
	#state: State = { kind: 'idle' };

	constructor(private readonly editor: Editor) {}

	press(pointer: GroundPointer): boolean {
		if (pointer.hitId !== null) {
			this.#state = { kind: 'pressed', start: pointer.point, hitId: pointer.hitId, shift: pointer.shift };
			return true;
		}
		if (!pointer.shift) return false;
		this.#state = { kind: 'boxing', start: pointer.point, before: this.editor.selected };
		return true;
	}

	drag(pointer: GroundPointer): void {
		if (this.#state.kind === 'pressed') this.#startMoving(this.#state, pointer);
		if (this.#state.kind === 'moving') this.#move(this.#state, pointer);
		if (this.#state.kind === 'boxing') {
			const box = boxOf(this.#state.start, pointer.point);
			const inside = idsInBox(this.editor.store.layout.trackers, box);
			this.editor.box = box;
			this.editor.select([...new Set([...this.#state.before, ...inside])]);
		}
	}

	release(pointer: GroundPointer): void {
		const state = this.#state;
		this.#state = { kind: 'idle' };
		this.editor.guides = [];
		this.editor.box = null;
		if (state.kind === 'pressed') {
			this.editor.select(selectionAfterClick(this.editor.selected, state.hitId, pointer.shift));
		}
		if (state.kind === 'moving') this.editor.store.commit();
	}

	tap(pointer: GroundPointer): void {
		this.editor.select(selectionAfterClick(this.editor.selected, pointer.hitId, pointer.shift));
	}

	hover(pointer: GroundPointer): void {
		this.editor.hoverId = pointer.hitId;
	}

	cancel(): boolean {
		const state = this.#state;
		this.#state = { kind: 'idle' };
		this.editor.guides = [];
		this.editor.box = null;
		if (state.kind === 'moving') this.editor.store.cancel();
		if (state.kind === 'boxing') this.editor.select(state.before);
		return state.kind !== 'idle';
	}

	#startMoving(state: Extract<State, { kind: 'pressed' }>, pointer: GroundPointer): void {
		const { editor } = this;
		if (editor.store.readOnly || !hasMoved(state.start, pointer.point, pointer.toleranceM)) return;
		if (!editor.selected.includes(state.hitId)) {
			editor.select(state.shift ? [...editor.selected, state.hitId] : [state.hitId]);
		}
		const ids = new Set(editor.selected);
		const one = editor.store.layout.trackers.find(({ id }) => id === state.hitId);
		const label = ids.size === 1 && one ? `Move ${one.tag}` : `Move ${ids.size} trackers`;
		editor.store.begin(label);
		this.#state = {
			kind: 'moving',
			start: state.start,
			hitId: state.hitId,
			ids,
			before: editor.store.layout,
			label
		};
	}

	#move(state: Extract<State, { kind: 'moving' }>, pointer: GroundPointer): void {
		const held = state.before.trackers.find(({ id }) => id === state.hitId);
		if (!held) return;
		const wanted: PlanPoint = [
			held.eastM + pointer.point[0] - state.start[0],
			held.northM + pointer.point[1] - state.start[1]
		];
		const others = state.before.trackers.filter(({ id }) => !state.ids.has(id));
		const aligned = pointer.free
			? { point: wanted, guides: [] }
			: alignPoint(wanted, others, pointer.toleranceM);
		this.editor.guides = aligned.guides;
		this.editor.store.replaceLayout(
			state.label,
			shiftTrackers(state.before, state.ids, aligned.point[0] - held.eastM, aligned.point[1] - held.northM)
		);
	}
}
