/** What a refused form gives back: a sentence, sentences by field, and what was typed (no secrets). */
export interface Refusal {
	message: string;
	errors: Record<string, string>;
	typed: Record<string, string>;
}

/** The refusal in an action's answer; null before anything was sent and after it went through. */
export function refusalOf(form: Partial<Refusal> | null): Refusal | null {
	if (!form?.errors) return null;
	return { message: form.message ?? '', errors: form.errors, typed: form.typed ?? {} };
}
