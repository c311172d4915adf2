import { afterNavigate, beforeNavigate, goto } from '$app/navigation';
import { page } from '$app/state';

/** The changes of a page as the browser's own history keeps them: undo and the browser's Back are one and the same. */
export interface Timeline {
	readonly canUndo: boolean;
	readonly canRedo: boolean;
	undo: () => void;
	redo: () => void;
	/** Goes to the address of a new state, in a new entry of the history or in place of this one. */
	go: (address: string, inPlace?: boolean) => Promise<void>;
}

/**
 * Follows the changes of a page whose state is its address. Each entry of the history knows how many changes lie before it, so
 * that undoing never leads off the page. Call it while the page's component is being made.
 */
export function createTimeline(): Timeline {
	const at = $derived(page.state.changes ?? 0);
	let furthest = $state(0);
	/** Steps asked of the browser that it has not made yet. */
	let underWay = 0;
	/** A new entry is on its way: what replaces it before it is there has to become that entry. */
	let pushing = false;
	let stay: { focused: Element | null; top: number } | null = null;

	beforeNavigate(({ type, from, to }) => {
		const within = type === 'popstate' && from?.url.pathname === to?.url.pathname;
		stay = within ? { focused: document.activeElement, top: window.scrollY } : null;
	});
	afterNavigate(({ type }) => {
		// Anything but a step in the history cuts off what was undone.
		furthest = type === 'popstate' ? Math.max(furthest, at) : at;
		underWay = 0;
		pushing = false;
		if (!stay) return;
		// Kit would scroll to where this entry was left and take the focus away.
		window.scrollTo(0, stay.top);
		if (stay.focused instanceof HTMLElement && stay.focused.isConnected)
			stay.focused.focus({ preventScroll: true });
		stay = null;
	});

	function step(by: -1 | 1) {
		const target = at + underWay + by;
		if (target < 0 || target > furthest) return;
		underWay += by;
		window.history.go(by);
	}
	return {
		get canUndo() {
			return at > 0;
		},
		get canRedo() {
			return at < furthest;
		},
		undo: () => step(-1),
		redo: () => step(1),
		go(address, inPlace = false) {
			pushing ||= !inPlace;
			return goto(address, {
				keepFocus: true,
				noScroll: true,
				replaceState: !pushing,
				state: { changes: pushing ? at + 1 : at }
			});
		}
	};
}
