/** What must be kept before this tab is loaded afresh: a page registers its draft while it is being typed. */
type Save = () => void | Promise<void>;

const saves = new Set<Save>();

/** Registers a function that saves a draft; the answer takes it off the list again. */
export function saveBeforeUpdate(save: Save): () => void {
	saves.add(save);
	return () => saves.delete(save);
}

/**
 * Calls every registered function and waits until each has ended, well or badly, but not longer than `patience`:
 * one draft that cannot be saved must not hold up the others, nor the update for ever.
 */
export async function saveAll(patience: number): Promise<void> {
	const all = Promise.allSettled([...saves].map(async (save) => save()));
	let timer: ReturnType<typeof setTimeout> | undefined;
	const enough = new Promise<void>((resolve) => {
		timer = setTimeout(resolve, patience);
	});
	await Promise.race([all, enough]);
	clearTimeout(timer);
}
