/** The part of `Storage` that is used here, so that tests can bring their own. */
export type CopyStorage = Pick<Storage, 'getItem' | 'setItem' | 'removeItem'>;

/** An edited document that the server has not acknowledged yet. */
export interface PendingCopy<T> {
	document: T;
	/** The revision that was edited. */
	baseRevision: number;
	savedAtMs: number;
	/** Earlier states that were sent on the same revision and whose answers never came: one of them may be stored by now. */
	unanswered?: T[];
}

/** Keeps one document on this device until the server has acknowledged it. */
export class PendingCopyStore<T> {
	constructor(
		private readonly storage: CopyStorage | null,
		private readonly key: string
	) {}

	/** False when the device refuses to keep it (no room, or storage switched off). */
	put(copy: PendingCopy<T>): boolean {
		if (!this.storage) return false;
		try {
			this.storage.setItem(this.key, JSON.stringify(copy));
			return true;
		} catch {
			// A full or forbidden storage is answered to the caller, who tells the user.
			return false;
		}
	}

	get(): PendingCopy<T> | null {
		const text = this.storage?.getItem(this.key) ?? null;
		if (text === null) return null;
		try {
			const copy = JSON.parse(text) as PendingCopy<T>;
			if (copy && typeof copy === 'object' && copy.document && Number.isInteger(copy.baseRevision))
				return copy;
		} catch {
			// A damaged copy can't be used by anybody; it is dropped below.
		}
		this.drop();
		return null;
	}

	drop(): void {
		this.storage?.removeItem(this.key);
	}
}
