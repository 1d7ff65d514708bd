/** The letter after another: A, B, … Z, AA, AB, …; the first is A. */
export function nextRevision(last: string | null): string {
	if (!last) return 'A';
	const letters = [...last];
	for (let i = letters.length - 1; i >= 0; i -= 1) {
		if (letters[i] !== 'Z') {
			letters[i] = String.fromCharCode(letters[i].charCodeAt(0) + 1);
			return letters.join('');
		}
		letters[i] = 'A';
	}
	return `A${letters.join('')}`;
}
