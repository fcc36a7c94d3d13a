import { metals, type MetalId } from '$trade/metal/metals.ts';

/** A metal's name at the head of a row: "Gold". */
export function metalName(metal: MetalId): string {
	const { name } = metals[metal];
	return name.charAt(0).toUpperCase() + name.slice(1);
}
