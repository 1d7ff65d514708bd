export interface Refusal {
	message: string;
	/** Sentences by field; empty when the whole was refused. */
	errors: Record<string, string>;
	typed: Record<string, string>;
}

/** What a form action refused, or null: SvelteKit types the answers of all actions of a page as one. */
export function refusalOf(
	form: { message?: string; errors?: Record<string, string>; typed?: Record<string, string> } | null
): Refusal | null {
	if (!form?.errors) return null;
	return { message: form.message ?? '', errors: form.errors, typed: form.typed ?? {} };
}
