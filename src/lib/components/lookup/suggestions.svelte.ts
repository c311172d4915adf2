import type { SearchHit } from '$lib/schemas/search';
import { readRecent } from './recent';

/** Something the list under the field offers. */
export interface Suggestion {
	kind: SearchHit['kind'] | 'recent';
	title: string;
	detail: string;
	address: string;
}

/** Asks for suggestions; rejects when the signal aborts or the server cannot answer. */
export type Ask = (query: string, signal: AbortSignal) => Promise<SearchHit[]>;

/** Short enough to feel at once, long enough that a typed word is one request. */
const PAUSE_MS = 120;

/** The list under a look-up field: what it offers, whether it is open, which one the arrow keys have reached. */
export class Suggestions {
	open = $state(false);
	items = $state.raw<readonly Suggestion[]>([]);
	/** Index of the suggestion that Enter takes; -1: the field itself. */
	active = $state(-1);
	/** The phrase the items answer; empty for recent look-ups. */
	answered = $state('');

	readonly #ask: Ask;
	#timer: ReturnType<typeof setTimeout> | undefined;
	#running: AbortController | undefined;

	constructor(ask: Ask) {
		this.#ask = ask;
	}

	/** Items grouped by kind, each with its index, in the order in which the kinds first come. */
	get groups(): { kind: Suggestion['kind']; items: { item: Suggestion; index: number }[] }[] {
		const indexed = this.items.map((item, index) => ({ item, index }));
		const kinds = this.items.map(({ kind }) => kind).filter((kind, at, all) => all.indexOf(kind) === at);
		return kinds.map((kind) => ({ kind, items: indexed.filter(({ item }) => item.kind === kind) }));
	}

	/** The field's text has changed: asks for suggestions after a pause. */
	typed(text: string): void {
		this.#stopAsking();
		const query = text.trim();
		this.active = -1;
		if (query === '') {
			this.showRecent();
			return;
		}
		this.#timer = setTimeout(() => void this.#load(query), PAUSE_MS);
	}

	/** Offers what was looked up on this device; closes where there is nothing. */
	showRecent(): void {
		this.items = readRecent().map(({ title, address }) => ({ kind: 'recent', title, detail: '', address }));
		this.answered = '';
		this.active = -1;
		this.open = this.items.length > 0;
	}

	/** Moves along the list, through the field at either end; opens it first where it has something to offer. */
	move(step: 1 | -1): void {
		if (!this.open) {
			this.open = this.items.length > 0;
			this.active = this.open ? (step === 1 ? 0 : this.items.length - 1) : -1;
			return;
		}
		const places = this.items.length + 1;
		this.active = ((this.active + 1 + step + places) % places) - 1;
	}

	/** Closes the list and forgets what is being asked. */
	close(): void {
		this.#stopAsking();
		this.open = false;
		this.active = -1;
	}

	async #load(query: string): Promise<void> {
		const running = new AbortController();
		this.#running = running;
		try {
			const hits = await this.#ask(query, running.signal);
			// A slow answer must not replace a newer one.
			if (running.signal.aborted) return;
			this.items = hits;
			this.answered = query;
			this.active = -1;
			this.open = hits.length > 0;
		} catch {
			// Suggestions are a convenience: without them Enter still looks up.
			if (!running.signal.aborted) this.close();
		}
	}

	#stopAsking(): void {
		clearTimeout(this.#timer);
		this.#running?.abort();
	}
}

/** Asks the server's own search. */
export function askServer(numbers: string): Ask {
	return async (query, signal) => {
		const address = `/api/v1/search?q=${encodeURIComponent(query)}&numbers=${numbers}`;
		const response = await fetch(address, { signal });
		if (!response.ok) throw new Error(`The search answered ${response.status}.`);
		return ((await response.json()) as { hits: SearchHit[] }).hits;
	};
}
