/**
 * Where each row of a long list begins: rows are as tall as expected until they have been measured. Sums are kept in a
 * binary indexed tree, so that finding the row at a place or changing one height takes a handful of steps for any length.
 */
export class RowHeights {
	readonly #count: number;
	readonly #expected: number;
	/** Differences from the expected height, by row. */
	readonly #differences: Float64Array;
	/** The tree over the differences, from index 1. */
	readonly #tree: Float64Array;

	constructor(count: number, expected: number) {
		this.#count = count;
		this.#expected = Math.max(1, expected);
		this.#differences = new Float64Array(count);
		this.#tree = new Float64Array(count + 1);
	}

	/** Takes a measured height; true when it moves the rows below by half a pixel or more. */
	set(index: number, height: number): boolean {
		if (index < 0 || index >= this.#count || !(height > 0)) return false;
		const change = height - this.#expected - this.#differences[index]!;
		if (Math.abs(change) < 0.5) return false;
		this.#differences[index]! += change;
		for (let i = index + 1; i <= this.#count; i += i & -i) this.#tree[i]! += change;
		return true;
	}

	/** The place at which row `index` begins; at `count`, where the list ends. */
	offset(index: number): number {
		let sum = index * this.#expected;
		for (let i = index; i > 0; i -= i & -i) sum += this.#tree[i]!;
		return sum;
	}

	total(): number {
		return this.offset(this.#count);
	}

	/** The row that covers a place: the last one that begins at or before it. */
	indexAt(place: number): number {
		let low = 0;
		let high = this.#count;
		while (high - low > 1) {
			const middle = (low + high) >> 1;
			if (this.offset(middle) <= place) low = middle;
			else high = middle;
		}
		return low;
	}
}
