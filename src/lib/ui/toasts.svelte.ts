import { createContext } from 'svelte';

export interface Toast {
	id: number;
	tone: 'info' | 'clear' | 'stop';
	message: string;
	action?: { label: string; run: () => void };
}

/** Short messages at the foot of the page; one with an action (an undo, say) stays longer, one about a failure until it is closed. */
export class Toasts {
	list = $state<Toast[]>([]);
	#next = 0;

	say(message: string, options: { tone?: Toast['tone']; action?: Toast['action'] } = {}): void {
		const toast: Toast = { id: ++this.#next, tone: options.tone ?? 'info', message, action: options.action };
		this.list = [...this.list.slice(-2), toast];
		if (toast.tone !== 'stop') setTimeout(() => this.close(toast.id), toast.action ? 10_000 : 5_000);
	}

	close(id: number): void {
		this.list = this.list.filter((toast) => toast.id !== id);
	}
}

const [get, set] = createContext<Toasts>();
export const getToasts = get;
export const setToasts = set;
