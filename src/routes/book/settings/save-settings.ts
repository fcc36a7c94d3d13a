import type { Change } from '$storage/append.ts';
import { SETTINGS } from '$storage/sums-after.ts';
import type { SettingsBody } from '$trade/record/kinds/settings.ts';
import type { Shop } from '../../shop.svelte.ts';

type Options = {
	/** The draft that the act uses up. */
	readonly draft?: string;
	/** What belongs to the same act. */
	readonly also?: readonly Change[];
};

/** The settings with some of them replaced, as a change of the one subject that holds them. */
export async function settingsChange(shop: Shop, part: Partial<SettingsBody>): Promise<Change> {
	// settings that were taken back leave a record behind, which the next ones replace
	const replaces = shop.settingsRecord ?? (await shop.book.standing(SETTINGS));
	return { kind: 'settings', subject: SETTINGS, body: { ...shop.settings, ...part }, replaces };
}

/** Saves some settings in one act that can be taken back; true when they are on the medium. */
export async function saveSettings(shop: Shop, said: string, part: Partial<SettingsBody>, { draft, also = [] }: Options = {}): Promise<boolean> {
	const change = await settingsChange(shop, part);
	return (await shop.act(said, [change, ...also], draft === undefined ? {} : { draft })).ok;
}
