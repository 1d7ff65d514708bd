import type { Editor } from '../editor.svelte';
import { alignPoint } from '../kernels/align';
import { hasMoved, type GroundPointer, type Tool } from './tool';

/** One tracker for each click; a ghost shows where it would stand. A drag that starts on the ground turns or pans the view. */
export class PlaceTool implements Tool {
	#start: GroundPointer | null = null;

	constructor(private readonly editor: Editor) {}

	press(pointer: GroundPointer): boolean {
		this.#start = pointer;
		this.#show(pointer);
		return true;
	}

	drag(pointer: GroundPointer): void {
		this.#show(pointer);
	}

	release(pointer: GroundPointer): void {
		this.#show(pointer);
		const [point] = this.editor.ghosts;
		this.#start = null;
		if (point) this.editor.addPoints('Place a tracker', [point]);
		this.editor.ghosts = [];
		this.editor.guides = [];
	}

	tap(pointer: GroundPointer): void {
		this.release(pointer);
	}

	hover(pointer: GroundPointer): void {
		this.#show(pointer);
	}

	cancel(): boolean {
		const had = this.#start !== null;
		this.#start = null;
		this.editor.ghosts = [];
		this.editor.guides = [];
		return had;
	}

	#show(pointer: GroundPointer): void {
		const { trackers } = this.editor.store.layout;
		const aligned = pointer.free
			? { point: pointer.point, guides: [] }
			: alignPoint(pointer.point, trackers, pointer.toleranceM);
		// The same ghost need not be drawn again.
		const [shown] = this.editor.ghosts;
		if (shown && !hasMoved(shown, aligned.point, 0)) return;
		this.editor.ghosts = [aligned.point];
		this.editor.guides = aligned.guides;
	}
}
