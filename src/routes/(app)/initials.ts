/** Two letters for a person: first and last name, else the first two letters of what is there. */
export function initials(name: string, email: string): string {
	const words = name.trim().split(/\s+/).filter(Boolean);
	const [first, last] = [words[0], words.at(-1)];
	if (first && last && words.length > 1) return (first[0] + last[0]).toUpperCase();
	return (first ?? email).slice(0, 2).toUpperCase();
}
