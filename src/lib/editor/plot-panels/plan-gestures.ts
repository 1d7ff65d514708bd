import type { PlanPoint } from '$lib/core';
import { toGround, toScreen } from '../kernels/plan-camera';
import { cornerAt, edgeMiddle, ringsOf, type CornerRef } from './boundary-edit';
import type { PlotDesk } from './plot-desk.svelte';

type Grab =
	| { kind: 'none' }
	| { kind: 'ground' }
	| { kind: 'corner'; ref: CornerRef; offset: PlanPoint; insert: boolean }
	| { kind: 'obstacle'; id: string; offset: PlanPoint };

/** Less than this is a click and not a drag, pixels. */
const STILL_PX = 4;
/** A click this near to the first corner closes the outline, pixels. */
export const CLOSE_PX = 14;

/**
 * Pointer, wheel and pinch on the plan. What was pressed is told by data attributes of the drawing: `data-corner`,
 * `data-middle` ("part.ring.index") and `data-obstacle` (id).
 */
export class PlanGestures {
	#desk: PlotDesk;
	#pointers = new Map<number, [x: number, y: number]>();
	#grab: Grab = { kind: 'none' };
	#start: [number, number] = [0, 0];
	#dragging = false;

	constructor(desk: PlotDesk) {
		this.#desk = desk;
	}

	#at(event: PointerEvent | WheelEvent): [number, number] {
		const box = (event.currentTarget as Element).getBoundingClientRect();
		return [event.clientX - box.left, event.clientY - box.top];
	}

	down = (event: PointerEvent): void => {
		if (event.button > 1) return;
		const at = this.#at(event);
		(event.currentTarget as Element).setPointerCapture(event.pointerId);
		this.#pointers.set(event.pointerId, at);
		if (this.#pointers.size === 2) {
			this.#abandon();
			return;
		}
		this.#start = at;
		this.#dragging = false;
		this.#grab = event.button === 1 ? { kind: 'ground' } : this.#grabbed(event.target as Element, at);
	};

	#grabbed(target: Element, at: [number, number]): Grab {
		const desk = this.#desk;
		if (desk.readOnly || desk.tool !== 'select') return { kind: 'ground' };
		const ground = toGround(desk.camera, ...at);
		const handle = target.closest<SVGElement>('[data-corner],[data-middle],[data-obstacle]');
		const obstacleId = handle?.dataset.obstacle;
		if (obstacleId) {
			const obstacle = desk.plot.obstacles.find((candidate) => candidate.id === obstacleId);
			if (!obstacle) return { kind: 'ground' };
			return {
				kind: 'obstacle',
				id: obstacleId,
				offset: [obstacle.eastM - ground[0], obstacle.northM - ground[1]]
			};
		}
		const address = handle?.dataset.corner ?? handle?.dataset.middle;
		if (!address) return { kind: 'ground' };
		const [part, ring, index] = address.split('.').map(Number);
		const ref: CornerRef = { part, ring, index };
		const insert = handle?.dataset.middle !== undefined;
		const from = insert
			? edgeMiddle(ringsOf(desk.plot.boundary[part])[ring], index)
			: cornerAt(desk.plot.boundary, ref);
		if (!from) return { kind: 'ground' };
		return { kind: 'corner', ref, insert, offset: [from[0] - ground[0], from[1] - ground[1]] };
	}

	move = (event: PointerEvent): void => {
		const desk = this.#desk;
		const at = this.#at(event);
		const ground = toGround(desk.camera, ...at);
		const before = this.#pointers.get(event.pointerId);
		if (!before) {
			desk.pointer = ground;
			return;
		}
		if (this.#pointers.size === 2) {
			this.#pinch(event.pointerId, before, at);
			return;
		}
		this.#pointers.set(event.pointerId, at);
		const grab = this.#grab;
		if (!this.#dragging) {
			if (Math.hypot(at[0] - this.#start[0], at[1] - this.#start[1]) < STILL_PX) return;
			this.#dragging = true;
			if (grab.kind === 'corner') this.#beginCorner(grab);
			else if (grab.kind === 'obstacle') desk.beginObstacle(grab.id);
		}
		if (grab.kind === 'ground') desk.pan(at[0] - before[0], at[1] - before[1]);
		else if (grab.kind === 'corner')
			desk.dragCorner([ground[0] + grab.offset[0], ground[1] + grab.offset[1]]);
		else if (grab.kind === 'obstacle')
			desk.dragObstacle([ground[0] + grab.offset[0], ground[1] + grab.offset[1]]);
		desk.pointer = toGround(desk.camera, ...at);
	};

	#beginCorner(grab: Extract<Grab, { kind: 'corner' }>): void {
		const desk = this.#desk;
		if (grab.insert) {
			desk.beginCorner(
				grab.ref,
				edgeMiddle(ringsOf(desk.plot.boundary[grab.ref.part])[grab.ref.ring], grab.ref.index)
			);
			return;
		}
		desk.selectCorner(grab.ref);
		desk.beginCorner(grab.ref, null);
	}

	#pinch(id: number, before: [number, number], at: [number, number]): void {
		const other = [...this.#pointers].find(([key]) => key !== id)?.[1];
		this.#pointers.set(id, at);
		if (!other) return;
		const spread = (a: [number, number], b: [number, number]) => Math.hypot(a[0] - b[0], a[1] - b[1]);
		const was = spread(before, other);
		if (was > 8) {
			const middle = [(at[0] + other[0]) / 2, (at[1] + other[1]) / 2];
			this.#desk.pan((at[0] - before[0]) / 2, (at[1] - before[1]) / 2);
			this.#desk.zoom(spread(at, other) / was, middle[0], middle[1]);
		}
	}

	up = (event: PointerEvent): void => {
		const known = this.#pointers.delete(event.pointerId);
		if (!known || this.#pointers.size > 0) return;
		const grab = this.#grab;
		this.#grab = { kind: 'none' };
		if (grab.kind === 'none') return;
		if (!this.#dragging) this.#click(grab, this.#at(event));
		else if (grab.kind === 'corner') this.#desk.endCorner();
		else if (grab.kind === 'obstacle') this.#desk.endObstacle();
		this.#dragging = false;
	};

	cancel = (event: PointerEvent): void => {
		this.#pointers.delete(event.pointerId);
		this.#abandon();
	};

	leave = (): void => {
		this.#desk.pointer = null;
	};

	wheel = (event: WheelEvent): void => {
		event.preventDefault();
		const [x, y] = this.#at(event);
		this.#desk.zoom(Math.exp(-event.deltaY * (event.deltaMode === 1 ? 0.04 : 0.0016)), x, y);
	};

	#abandon(): void {
		if (this.#dragging && (this.#grab.kind === 'corner' || this.#grab.kind === 'obstacle')) {
			this.#desk.cancelMove();
		}
		this.#grab = { kind: 'none' };
		this.#dragging = false;
	}

	#click(grab: Grab, at: [number, number]): void {
		const desk = this.#desk;
		const ground = toGround(desk.camera, ...at);
		if (desk.drawing) this.#draw(ground, at);
		else if (desk.placing) desk.place(desk.placing, ground);
		else if (grab.kind === 'corner' && !grab.insert) desk.selectCorner(grab.ref);
		else if (grab.kind === 'corner') {
			// A click on the middle of an edge sets a corner there.
			this.#beginCorner(grab);
			desk.endCorner();
		} else if (grab.kind === 'obstacle') desk.selectObstacle(grab.id);
		else desk.clearSelection();
	}

	#draw(ground: PlanPoint, at: [number, number]): void {
		const desk = this.#desk;
		if (desk.draft.length >= desk.leastCorners) {
			// An outline is closed on its first corner, a line is ended on its last.
			const end = desk.draft[desk.drawing === 'wall' ? desk.draft.length - 1 : 0];
			const closing = toScreen(desk.camera, end);
			if (Math.hypot(closing[0] - at[0], closing[1] - at[1]) <= CLOSE_PX) {
				desk.closeDraft();
				return;
			}
		}
		desk.addDraftCorner(ground);
	}
}
