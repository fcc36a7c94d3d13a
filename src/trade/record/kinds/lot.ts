import { moment, name, nullable, object, oneOf, text } from '../shape.ts';

/** Pieces bought together, from the first one on the counter until the lot is paid or set aside. */
export type LotBody = {
	readonly name: string;
	readonly note: string;
	readonly state: 'open' | 'bought' | 'set-aside';
	/** The purchase that paid for it. */
	readonly purchase: string | null;
	/** The price sheet it was last valued at. */
	readonly sheet: string | null;
	readonly openedAt: number;
	/** What the seller asks, as typed. */
	readonly ask: string | null;
};

export const lotShape = object<LotBody>({
	name: text,
	note: text,
	state: oneOf(['open', 'bought', 'set-aside']),
	purchase: nullable(name),
	sheet: nullable(name),
	openedAt: moment,
	ask: nullable(text)
});
