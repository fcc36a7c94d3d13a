/** How safe the browser keeps the book from its own clearing up. */
export type Durability = {
	/** True: kept until the person removes it. Null: the browser does not say. */
	readonly persisted: boolean | null;
	readonly usage: number | null;
	readonly quota: number | null;
};

type Manager = Partial<Pick<StorageManager, 'persist' | 'persisted' | 'estimate'>>;

const manager = (): Manager => (globalThis.navigator as { storage?: Manager } | undefined)?.storage ?? {};

/** Asks for lasting storage; asked after the first saved purchase, with the reason on the page. False: not granted. */
export async function persist(storage: Manager = manager()): Promise<boolean> {
	try {
		if ((await storage.persisted?.()) === true) return true;
		return (await storage.persist?.()) ?? false;
	} catch {
		return false;
	}
}

export async function durability(storage: Manager = manager()): Promise<Durability> {
	try {
		const persisted = (await storage.persisted?.()) ?? null;
		const { usage = null, quota = null } = (await storage.estimate?.()) ?? {};
		return { persisted, usage, quota };
	} catch {
		return { persisted: null, usage: null, quota: null };
	}
}
