import type { Attachment } from 'svelte/attachments';

/** Which row a key leads to, or `undefined` when the key isn't ours. */
export function rowAfterKey(key: string, current: number, count: number): number | undefined {
	if (count === 0) return undefined;
	switch (key) {
		case 'j':
		case 'J':
		case 'ArrowDown':
			return Math.min(current + 1, count - 1);
		case 'k':
		case 'K':
		case 'ArrowUp':
			return Math.max(current - 1, 0);
		case 'Home':
			return 0;
		case 'End':
			return count - 1;
		default:
			return undefined;
	}
}

const isTyping = (target: EventTarget | null) =>
	target instanceof HTMLElement && target.matches('input, select, textarea, [contenteditable]');

/**
 * Moves the focus through the rows marked `data-row` by J, K and the arrow keys; Enter follows the
 * row's first link or presses its first button. One row is in the tab order at a time. J and K work from anywhere on the page
 * that isn't a field, so that they keep working while a side sheet is open.
 */
export const rowNavigation: Attachment<HTMLTableElement> = (table) => {
	const rows = () => [...table.querySelectorAll<HTMLElement>('[data-row]')];
	let last = -1;

	const mark = () => {
		const all = rows();
		const inOrder = Math.max(0, Math.min(last, all.length - 1));
		all.forEach((row, index) => row.setAttribute('tabindex', index === inOrder ? '0' : '-1'));
	};

	const onFocus = (event: FocusEvent) => {
		const row = event.target instanceof Element ? event.target.closest('[data-row]') : null;
		const index = rows().findIndex((other) => other === row);
		if (index < 0) return;
		last = index;
		mark();
	};

	const onKey = (event: KeyboardEvent) => {
		if (event.defaultPrevented || event.ctrlKey || event.metaKey || event.altKey) return;
		if (isTyping(event.target)) return;
		const all = rows();
		const isInside = event.target instanceof Node && table.contains(event.target);
		if (event.key === 'Enter') {
			const row = all.find((other) => other === event.target);
			if (row) row.querySelector<HTMLElement>('a, button')?.click();
			return;
		}
		if (!isInside && !/^[jk]$/i.test(event.key)) return;
		const next = rowAfterKey(event.key, last, all.length);
		if (next === undefined) return;
		event.preventDefault();
		all[next]?.focus();
	};

	mark();
	const observer = new MutationObserver(mark);
	observer.observe(table, { childList: true, subtree: true });
	table.addEventListener('focusin', onFocus);
	document.addEventListener('keydown', onKey);
	return () => {
		observer.disconnect();
		table.removeEventListener('focusin', onFocus);
		document.removeEventListener('keydown', onKey);
	};
};
