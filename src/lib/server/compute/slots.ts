/** Lets so many pieces of work through at a time; the others wait in the order in which they came. */
export class Slots {
	private free: number;
	private readonly waiting: (() => void)[] = [];

	constructor(count: number) {
		this.free = count;
	}

	/** Runs the work once there is room for it. */
	async use<T>(work: () => Promise<T>): Promise<T> {
		if (this.free > 0) this.free -= 1;
		else await new Promise<void>((go) => this.waiting.push(go));
		try {
			return await work();
		} finally {
			const next = this.waiting.shift();
			if (next) next();
			else this.free += 1;
		}
	}
}
