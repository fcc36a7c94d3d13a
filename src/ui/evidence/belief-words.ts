import type { Assessment } from '$trade/evidence/assess.ts';
import type { Contradiction, Says } from '$trade/evidence/contradiction.ts';
import type { Possible, TestValue } from '$trade/evidence/next-test.ts';
import type { Subject } from '$trade/evidence/subject.ts';
import { perMilleNumber } from '$trade/metal/fineness.ts';
import { lookAlike, type LookAlikeId } from '$trade/metal/look-alikes.ts';
import type { Format } from '../format.ts';
import { karatWords } from './karat-words.ts';

/** What is believed, in one sentence a colleague would say. */
export function verdict(subject: Subject, found: Assessment, tested: boolean, format: Format): string {
	const { odds, low, high } = found;
	const between = `${format.interval(low, high, '‰', 0)}`;
	if (odds.layered > 0.9) return 'This is a layer over something else: it is worth next to nothing as metal, whatever its surface says.';
	if (odds.layered > 0.1) return `It may be filled: ${format.chance(odds.layered)} for a layer over something else. Do not pay for it before you know.`;
	if (subject.claimed === null) {
		return tested ? `Without a mark it is what the tests say: ${between}, nine times in ten.` : 'It has no mark and no test: it may be anything.';
	}
	const mark = karatWords(subject.claimed, subject.metal, format);
	const alone = subject.origin === 'unmarked' ? 'By what is said of it alone' : 'By its mark alone';
	if (!tested) return `${alone}, untested: ${mark}, ${between}, nine times in ten.`;
	if (odds.other > 0.5) return `It is not ${mark}, it is another standard: ${between}, nine times in ten.`;
	if (odds.under > 0.5) return `It runs under its mark: ${between}, nine times in ten.`;
	if (odds.honest > 0.9) return `It is what its mark says, ${mark}: ${between}, nine times in ten.`;
	return `Most likely ${mark} as marked, but not surely: ${between}, nine times in ten.`;
}

const listed = (words: readonly string[]): string =>
	words.length < 2 ? (words[0] ?? '') : `${words.slice(0, -1).join(', ')} or ${words.at(-1)}`;

export function coreWords(cores: readonly LookAlikeId[]): string {
	return listed(cores.map((core) => lookAlike(core).name));
}

/** "the streak says 14 to 18 kt". */
export function saysWords(says: Says, metal: Subject['metal'], format: Format): string {
	const fineness = (perMille: number) => karatWords(perMille, metal, format);
	switch (says.by) {
		case 'mark':
			return `the mark says ${fineness(says.perMille)}`;
		case 'touch': {
			const low = says.holds === null ? null : fineness(perMilleNumber(says.holds));
			const high = says.attackedBy === null ? null : fineness(perMilleNumber(says.attackedBy));
			if (low === null) return `the streak says less than ${high ?? ''}`;
			return `the streak says ${low}${high === null ? ' or more' : ''}`;
		}
		case 'fluorescence':
			return `the fluorescence reading says ${fineness(says.perMille)}`;
		case 'core':
			return `the core test says ${fineness(says.perMille)}`;
		case 'assay':
			return `the fire assay says ${fineness(says.perMille)}`;
		case 'water':
			return says.like.length === 0
				? `the water says ${format.estimate(says.density, 4)}\u00a0g/cm³`
				: `the water says ${coreWords(says.like)} (${format.estimate(says.density, 3)}\u00a0g/cm³)`;
		case 'magnet':
			return `the magnet draws it ${says.pull === 'weak' ? 'a little' : 'strongly'}`;
		case 'coin':
			return `the scale says ${format.estimate(says.grams, 4)}\u00a0g, which the coin does not weigh`;
	}
}

/** Those that one voice contradicts, in one sentence: "The streak says 14 kt, but the water says brass." */
export function contradictionWords(clashes: readonly Contradiction[], metal: Subject['metal'], format: Format): string[] {
	const against = new Map<string, string[]>();
	for (const { first, second } of clashes) {
		const voice = saysWords(second, metal, format);
		against.set(voice, [...(against.get(voice) ?? []), saysWords(first, metal, format)]);
	}
	return [...against].map(([voice, others]) => {
		const words = `${others.join(', ')}, but ${voice}.`;
		return `${words.charAt(0).toUpperCase()}${words.slice(1)}`;
	});
}

/** What no test done so far can see. */
export function unseenWords(cores: readonly LookAlikeId[], odds: number, format: Format): string {
	if (cores.length === 0) return '';
	return `No test done so far can see ${coreWords(cores)} under the surface: that stays at ${format.chance(odds)}.`;
}

const DO: Readonly<Record<Possible['kind'], string>> = {
	touch: 'File a notch and touch it with acids',
	fluorescence: 'Read it by fluorescence',
	core: 'Cut it and read the inside',
	assay: 'Have a sample fire-assayed',
	water: 'Weigh it in water',
	magnet: 'Hold a magnet to it'
};

export function testName(test: Possible): string {
	return test.kind === 'touch' && test.how === 'rub' ? 'Rub a streak and touch it with acids' : DO[test.kind];
}

/** "Cut it and read the inside: knowing is worth 259 before you buy." */
export function nextWords(values: readonly TestValue[], amount: (value: number) => string): string {
	const [best] = values;
	if (best === undefined || best.net <= 0) return 'No further test is worth its cost before you buy.';
	return `${testName(best.test)}: knowing is worth ${amount(best.gain)} before you buy, and costs ${amount(best.cost)}.`;
}
