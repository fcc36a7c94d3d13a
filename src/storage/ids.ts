/** Crockford's digits: no I, L, O, U, so that an id can be read out. They sort as they count. */
const DIGITS = '0123456789ABCDEFGHJKMNPQRSTVWXYZ';
const TIME_DIGITS = 10;
const RANDOM_DIGITS = 16;

let last = '';

/**
 * A new name for a record, a subject or an act: ten digits of milliseconds, then eighty random bits. Ids made later on one
 * device sort later, also within a millisecond or when the clock is set back; two devices never make the same one.
 */
export function newId(now: number = Date.now()): string {
	let time = '';
	for (let rest = now, place = 0; place < TIME_DIGITS; place += 1) {
		time = DIGITS[rest % 32]! + time;
		rest = Math.floor(rest / 32);
	}
	const random = crypto.getRandomValues(new Uint8Array(RANDOM_DIGITS));
	const fresh = time + Array.from(random, (byte) => DIGITS[byte % 32]!).join('');
	last = fresh > last ? fresh : following(last);
	return last;
}

/** The next text of digits after this one. */
function following(id: string): string {
	const place = id.search(/[^Z]Z*$/);
	const next = DIGITS[DIGITS.indexOf(id[place]!) + 1]!;
	return id.slice(0, place) + next + '0'.repeat(id.length - place - 1);
}

/** The id of the n-th record of an act: the same act tried again makes the same ids. */
export function recordId(act: string, index: number): string {
	return `${act}-${index.toString(36).padStart(4, '0')}`;
}
