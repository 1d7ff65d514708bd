import type { GroundPointer, Tool } from './tools';

export interface ViewHandle {
	/** What lies under a point of the view, in pixels from its upper left; null where there is no ground. */
	locate(x: number, y: number, event: PointerEvent): GroundPointer | null;
	/** The pointer is dragging the view itself; `second` is the right or middle button, or shift-free panning. */
	dragView(dx: number, dy: number, second: boolean): void;
	zoom(x: number, y: number, factor: number): void;
	tool(): Tool;
}

type Hold = 'none' | 'tool' | 'view' | 'second' | 'pinch';
const clickPx = 4;

/**
 * Turns pointer events of a view into calls of the tool in hand, or into moving the view. Moves are taken once a frame. Two
 * fingers move and zoom the view and give up what one finger had begun.
 */
export class PointerDriver {
	#hold: Hold = 'none';
	#pointers = new Map<number, { x: number; y: number }>();
	#start = { x: 0, y: 0 };
	#last = { x: 0, y: 0 };
	#wandered = false;
	#frame: number | null = null;
	#latest: PointerEvent | null = null;

	constructor(
		private readonly element: HTMLElement | SVGElement,
		private readonly view: ViewHandle
	) {}

	/** Listens; answers what stops it. */
	listen(): () => void {
		const { element } = this;
		const wheel = (event: Event): void => this.#wheel(event as WheelEvent);
		const on: [string, (event: Event) => void][] = [
			['pointerdown', (event) => this.#down(event as PointerEvent)],
			['pointermove', (event) => this.#move(event as PointerEvent)],
			['pointerup', (event) => this.#up(event as PointerEvent)],
			['pointercancel', (event) => this.#lost(event as PointerEvent)],
			['contextmenu', (event) => event.preventDefault()]
		];
		for (const [name, handler] of on) element.addEventListener(name, handler);
		element.addEventListener('wheel', wheel, { passive: false });
		return () => {
			for (const [name, handler] of on) element.removeEventListener(name, handler);
			element.removeEventListener('wheel', wheel);
			if (this.#frame !== null) cancelAnimationFrame(this.#frame);
		};
	}

	#place(event: MouseEvent): { x: number; y: number } {
		const box = this.element.getBoundingClientRect();
		return { x: event.clientX - box.left, y: event.clientY - box.top };
	}

	#down(event: PointerEvent): void {
		const place = this.#place(event);
		this.#pointers.set(event.pointerId, place);
		this.element.setPointerCapture(event.pointerId);
		if (this.#pointers.size === 2) {
			if (this.#hold === 'tool') this.view.tool().cancel();
			this.#hold = 'pinch';
			return;
		}
		if (this.#pointers.size > 2) return;
		this.#start = place;
		this.#last = place;
		this.#wandered = false;
		if (event.button === 1 || event.button === 2) {
			this.#hold = 'second';
			event.preventDefault();
			return;
		}
		const pointer = this.view.locate(place.x, place.y, event);
		this.#hold = pointer && this.view.tool().press(pointer) ? 'tool' : 'view';
	}

	#move(event: PointerEvent): void {
		if (this.#hold === 'pinch') {
			this.#pinch(event);
			return;
		}
		this.#latest = event;
		this.#frame ??= requestAnimationFrame(() => this.#takeMove());
	}

	#takeMove(): void {
		this.#frame = null;
		const event = this.#latest;
		this.#latest = null;
		if (!event || this.#hold === 'pinch') return;
		const place = this.#place(event);
		if (Math.hypot(place.x - this.#start.x, place.y - this.#start.y) > clickPx) this.#wandered = true;
		if (this.#hold === 'view' || this.#hold === 'second') {
			if (this.#wandered) {
				this.view.dragView(place.x - this.#last.x, place.y - this.#last.y, this.#hold === 'second');
				this.#last = place;
			}
			return;
		}
		const pointer = this.view.locate(place.x, place.y, event);
		if (!pointer) return;
		if (this.#hold === 'tool') this.view.tool().drag(pointer);
		else this.view.tool().hover(pointer);
	}

	#up(event: PointerEvent): void {
		// The last move may still wait for its frame; the release must not overtake it.
		if (this.#frame !== null) {
			cancelAnimationFrame(this.#frame);
			this.#takeMove();
		}
		this.#pointers.delete(event.pointerId);
		const hold = this.#hold;
		if (hold === 'pinch') {
			if (this.#pointers.size === 0) this.#hold = 'none';
			return;
		}
		this.#hold = 'none';
		const place = this.#place(event);
		const pointer = this.view.locate(place.x, place.y, event);
		if (!pointer) {
			if (hold === 'tool') this.view.tool().cancel();
			return;
		}
		if (hold === 'tool') this.view.tool().release(pointer);
		else if (hold === 'view' && !this.#wandered) this.view.tool().tap(pointer);
	}

	#lost(event: PointerEvent): void {
		this.#pointers.delete(event.pointerId);
		if (this.#hold === 'tool') this.view.tool().cancel();
		this.#hold = 'none';
	}

	#pinch(event: PointerEvent): void {
		const before = this.#pointers.get(event.pointerId);
		const other = [...this.#pointers].find(([id]) => id !== event.pointerId)?.[1];
		if (!before || !other) return;
		const now = this.#place(event);
		this.#pointers.set(event.pointerId, now);
		const gap = (p: { x: number; y: number }): number =>
			Math.max(10, Math.hypot(p.x - other.x, p.y - other.y));
		this.view.dragView((now.x - before.x) / 2, (now.y - before.y) / 2, true);
		this.view.zoom((now.x + other.x) / 2, (now.y + other.y) / 2, gap(now) / gap(before));
	}

	#wheel(event: WheelEvent): void {
		event.preventDefault();
		const { x, y } = this.#place(event);
		// Lines and pages are turned into pixels in a usual size.
		const unit = event.deltaMode === 0 ? 1 : event.deltaMode === 1 ? 16 : 400;
		this.view.zoom(x, y, Math.exp(-event.deltaY * unit * 0.0015));
	}
}
