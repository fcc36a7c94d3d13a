import { fail, ok, type Result } from '../number/result.ts';

export type WaterTemperatureProblem = { readonly kind: 'water-temperature'; readonly celsius: number; readonly least: number; readonly most: number };

/** Where the formula for water was fitted, °C. */
const LEAST = 0;
const MOST = 40;

/**
 * The density of clean water free of air, in g/cm³.
 * formula: a5 (1 − (t + a1)² (t + a2) / (a3 (t + a4))), t in °C, from 0 to 40.
 * rounding: none; the formula is good to about 1 part per million.
 * source: Tanaka, Girard, Davis, Peuto and Bignell, Metrologia 38 (2001) 301, equation 1 and table 1.
 */
export function waterDensity(celsius: number): Result<number, WaterTemperatureProblem> {
	if (!(celsius >= LEAST && celsius <= MOST)) return fail({ kind: 'water-temperature', celsius, least: LEAST, most: MOST });
	const [a1, a2, a3, a4, a5] = [-3.983035, 301.797, 522528.9, 69.34881, 999.97495] as const;
	return ok((a5 * (1 - ((celsius + a1) ** 2 * (celsius + a2)) / (a3 * (celsius + a4)))) / 1000);
}

/** Air in a room, g/cm³: good to 10 % anywhere a shop stands, which moves a density by less than one part in ten thousand. */
export const ROOM_AIR = 0.0012;

/**
 * The density of moist air, in g/cm³.
 * formula: (0.34848 p − 0.009 h e^(0.061 t)) / (273.15 + t) kg/m³, pressure p in hPa, relative humidity h in %, t in °C.
 * rounding: none; good to 2 parts in ten thousand between 900 and 1100 hPa, 10 and 30 °C, under 80 %.
 * source: OIML R 111-1:2004, E.3 equation E.3-1.
 */
export function airDensity(celsius: number, hectopascal: number, humidity: number): number {
	return (0.34848 * hectopascal - 0.009 * humidity * Math.exp(0.061 * celsius)) / (273.15 + celsius) / 1000;
}
