/** Hands the browser a text to save as a file. */
export function saveAs(name: string, text: string, type: string): void {
	const url = URL.createObjectURL(new Blob([text], { type }));
	const link = document.createElement('a');
	link.href = url;
	link.download = name;
	link.click();
	setTimeout(() => URL.revokeObjectURL(url), 1_000);
}
