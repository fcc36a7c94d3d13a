import type { Book } from '$storage/book.ts';
import { pieceName } from '$ui/piece-words.ts';

/** What people call a thing of the book: "purchase A-0007", a lot's name; its bare name where nothing better is known. */
export async function nameOf(book: Book, subject: string): Promise<string> {
	const purchase = await book.get('purchase', subject);
	if (purchase?.body) return `purchase ${purchase.body.number ?? ''}`.trim();
	const lot = await book.get('lot', subject);
	if (lot?.body) return `the lot “${lot.body.name}”`;
	const piece = await book.get('piece', subject);
	if (piece?.body) return `the piece “${pieceName(piece.body.piece)}”`;
	return subject;
}
