/** Breaks a text into lines of at most so many letters, between words where there are any. */
export function wrapText(text: string, letters: number): string[] {
	const lines: string[] = [];
	for (const word of text
		.split(' ')
		.flatMap((each) => each.match(new RegExp(`.{1,${letters}}`, 'gu')) ?? [])) {
		const last = lines.at(-1);
		if (last !== undefined && last.length + 1 + word.length <= letters)
			lines[lines.length - 1] = `${last} ${word}`;
		else lines.push(word);
	}
	return lines;
}
