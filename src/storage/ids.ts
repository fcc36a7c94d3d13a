/** Crockford's digits: no I, L, O, U, so that an id can be read out. They sort as they count. */
const DIGITS = '0123456789ABCDEFGHJKMNPQRSTVWXYZ';
const TIME_DIGITS = 10;
const RANDOM_DIGITS = 16;

/**
 * A new name for a record, a subject or an act: ten digits of milliseconds, then eighty random bits. Ids made later sort
 * later; two devices never make the same one.
 */
export function newId(now: number = Date.now()): string {
	let time = '';
	for (let rest = now, place = 0; place < TIME_DIGITS; place += 1) {
		time = DIGITS[rest % 32]! + time;
		rest = Math.floor(rest / 32);
	}
	const random = crypto.getRandomValues(new Uint8Array(RANDOM_DIGITS));
	return time + Array.from(random, (byte) => DIGITS[byte % 32]!).join('');
}

/** The id of the n-th record of an act: the same act tried again makes the same ids. */
export function recordId(act: string, index: number): string {
	return `${act}-${index.toString(36).padStart(4, '0')}`;
}
