/** What checks have to say. */
type RemarkLevel = 'error' | 'warning' | 'note';

/** Something to say of one field. `path` is dotted: `total`, `figures` for the list as a whole, `figures.2.count`. */
export interface Remark {
	level: RemarkLevel;
	path: string;
	message: string;
}

/** Collects remarks. */
export class Remarks {
	readonly list: Remark[] = [];
	error = (path: string, message: string) => void this.list.push({ level: 'error', path, message });
	warning = (path: string, message: string) => void this.list.push({ level: 'warning', path, message });
	note = (path: string, message: string) => void this.list.push({ level: 'note', path, message });
	get failed(): boolean {
		return this.list.some(({ level }) => level === 'error');
	}
}
