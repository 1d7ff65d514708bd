import type { PlanPoint } from '$lib/core';
import { hasMoved, type GroundPointer, type Tool } from './tool';

/**
 * A line from one point to another, either by dragging or by two clicks. What the line is for is given by whoever makes it:
 * a row of trackers, or a distance.
 */
export class LineTool implements Tool {
	#start: PlanPoint | null = null;
	#dragged = false;

	constructor(
		private readonly snap: (pointer: GroundPointer, start: PlanPoint | null) => PlanPoint,
		private readonly show: (from: PlanPoint, to: PlanPoint | null) => void,
		private readonly finish: (from: PlanPoint, to: PlanPoint) => void,
		private readonly clear: () => void
	) {}

	press(pointer: GroundPointer): boolean {
		this.#dragged = false;
		if (this.#start === null) {
			this.#start = this.snap(pointer, null);
			this.show(this.#start, null);
		} else {
			this.#dragged = true;
			this.show(this.#start, this.snap(pointer, this.#start));
		}
		return true;
	}

	drag(pointer: GroundPointer): void {
		if (!this.#start) return;
		const to = this.snap(pointer, this.#start);
		if (hasMoved(this.#start, to, pointer.toleranceM)) this.#dragged = true;
		this.show(this.#start, to);
	}

	release(pointer: GroundPointer): void {
		if (!this.#start || !this.#dragged) return;
		const from = this.#start;
		const to = this.snap(pointer, from);
		this.#start = null;
		this.#dragged = false;
		if (hasMoved(from, to, 0)) this.finish(from, to);
		else this.clear();
	}

	tap(pointer: GroundPointer): void {
		this.press(pointer);
		this.release(pointer);
	}

	hover(pointer: GroundPointer): void {
		if (this.#start) this.show(this.#start, this.snap(pointer, this.#start));
	}

	cancel(): boolean {
		const had = this.#start !== null;
		this.#start = null;
		this.#dragged = false;
		this.clear();
		return had;
	}
}
