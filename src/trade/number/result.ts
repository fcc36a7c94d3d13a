/** What a person can cause is a value: either the answer or the problem, with the numbers a helpful sentence needs. */
export type Result<T, P> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly problem: P };

export function ok<T>(value: T): { readonly ok: true; readonly value: T } {
	return { ok: true, value };
}

export function fail<P>(problem: P): { readonly ok: false; readonly problem: P } {
	return { ok: false, problem };
}
