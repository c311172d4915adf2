/**
 * Runs things nobody waits for one after another, so that at most one of them stands between a person's request and a
 * worker. Beyond `most` waiting a new one is dropped: whoever still wants it will ask again.
 */
export class OneByOne {
	#last: Promise<unknown> = Promise.resolve();
	#waiting = 0;

	constructor(private readonly most: number) {}

	/** @returns whether it was taken on; failures are the task's own to report */
	add(task: () => Promise<unknown>): boolean {
		if (this.#waiting >= this.most) return false;
		this.#waiting++;
		this.#last = this.#last
			.then(task)
			.catch(() => undefined)
			.finally(() => this.#waiting--);
		return true;
	}
}
