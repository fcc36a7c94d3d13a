import { builds, type Belief, type Evidence, type HypothesisId, type Taking } from '../../evidence/belief.ts';
import type { Assay, CoinWeight, Core, Finding, Fluorescence, Magnet, Pull, Read, Touch, Water } from '../../evidence/finding.ts';
import {
	byKey, decimalText, list, moment, name, notNegative, nullable, number, object, oneOf, positiveText, refined, text, variants, within,
	type Shape
} from '../shape.ts';
import { fineness, metal } from './shared.ts';

/** More than anybody tests of one piece, and few enough that a piece stays small. */
const MOST_FINDINGS = 200;
const MOST_READS = 60;

const perMille = refined(decimalText, (value) => (value.lt(0) || value.gt(1000) ? 'parts per thousand from 0 to 1000' : null));
const notUnderZero = refined(decimalText, (value) => (value.lt(0) ? 'a decimal of 0 or more' : null));
/** What a likelihood divides by. */
const doubt = refined(within(0, 1000), (u) => (u > 0 ? null : 'an uncertainty above 0'));

const found = { id: name, at: moment };
const readBy = { tester: nullable(name), u: doubt, bias: within(0, 1000), gross: within(0, 1) };

const reads = refined(list(object<Read>({ metal, perMille }), MOST_READS), (each) =>
	each.length > 0 && new Set(each.map((read) => read.metal)).size === each.length ? null : 'readings, one for each metal'
);

const finding = variants<Finding>({
	touch: refined(
		object<Touch>({
			kind: oneOf(['touch']), ...found, ...readBy, how: oneOf(['rub', 'notch']), holds: nullable(fineness), attackedBy: nullable(fineness)
		}),
		({ holds, attackedBy }) => (holds === null && attackedBy === null ? 'a streak that met an acid' : null)
	),
	fluorescence: object<Fluorescence>({ kind: oneOf(['fluorescence']), ...found, ...readBy, reads }),
	water: object<Water>({
		kind: oneOf(['water']), ...found, method: oneOf(['suspended', 'beaker']), air: positiveText, water: notUnderZero,
		division: positiveText, temperature: decimalText
	}),
	magnet: object<Magnet>({ kind: oneOf(['magnet']), ...found, pull: oneOf<Pull>(['none', 'weak', 'strong']) }),
	core: object<Core>({ kind: oneOf(['core']), ...found, ...readBy, perMille }),
	assay: object<Assay>({ kind: oneOf(['assay']), ...found, ...readBy, perMille, sampleU: notNegative, by: text }),
	coin: object<CoinWeight>({
		kind: oneOf(['coin']), ...found, coin: name, grams: positiveText, division: positiveText, diameter: nullable(positiveText)
	})
});

const chance = within(0, 1);
const level = within(0, 1000);

const belief = object<Belief>({
	metal,
	mean: level,
	low: level,
	median: level,
	high: level,
	odds: object<Record<HypothesisId, number>>({ honest: chance, under: chance, other: chance, layered: chance }),
	shared: refined(byKey<string, number>(name, number), (each) =>
		Object.keys(each).length <= MOST_FINDINGS ? null : `testers, at most ${MOST_FINDINGS}`
	) as Shape<Belief['shared']>,
	own: notNegative
});

const taking = object<Taking>({ metal, taken: fineness, rests: list(name, MOST_FINDINGS), prudence: chance });

/** What was tested of a piece. Every finding has a name of its own, which the decision rests on. */
export const evidence = refined(
	object<Evidence>({
		build: nullable(oneOf(builds)),
		findings: refined(list(finding, MOST_FINDINGS), (each) =>
			new Set(each.map(({ id }) => id)).size === each.length ? null : 'findings, each with a name of its own'
		),
		belief: nullable(belief),
		taking: nullable(taking)
	}),
	(each) => (each.belief !== null && each.findings.length === 0 ? 'a belief that rests on findings' : null)
);
