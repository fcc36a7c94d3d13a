import { checkScale, type AccuracyClass, type Scale, type ScaleProblem } from '$trade/mass/scale.ts';
import type { MassUnitId } from '$trade/mass/units.ts';
import { parseNumber, type DecimalMark, type NumberProblem } from '$trade/number/field.ts';
import { fail, ok, type Result } from '$trade/number/result.ts';
import { typedNumber } from '$ui/format/typed-text.ts';

/** A scale while it is typed; an empty class is a scale that nobody has verified. */
export type TypedScale = {
	readonly name: string;
	readonly unit: MassUnitId;
	readonly division: string;
	readonly verification: string;
	readonly accuracyClass: AccuracyClass | '';
	readonly checkedOn: string;
};

export function newScale(unit: MassUnitId): TypedScale {
	return { name: '', unit, division: '', verification: '', accuracyClass: '', checkedOn: '' };
}

export function typedScale({ name, unit, division, verification, accuracyClass, checkedOn }: Scale, mark: DecimalMark): TypedScale {
	return {
		name,
		unit,
		division: typedNumber(division, mark),
		verification: accuracyClass === null ? '' : typedNumber(verification, mark),
		accuracyClass: accuracyClass ?? '',
		checkedOn: checkedOn ?? ''
	};
}

export type ScaleField = 'name' | 'division' | 'verification';
export type ScaleFormProblem = { readonly field: ScaleField; readonly problem: NumberProblem | ScaleProblem };

/** The scale as typed, or the first thing wrong and its field. Without a class the display's step stands for e. */
export function readScale(id: string, typed: TypedScale, mark: DecimalMark): Result<Scale, ScaleFormProblem> {
	const division = parseNumber(typed.division, { mark, positive: true, most: '1000' });
	if (!division.ok) return fail({ field: 'division', problem: division.problem });
	const verified = typed.accuracyClass === '' ? division : parseNumber(typed.verification, { mark, positive: true, most: '1000' });
	if (!verified.ok) return fail({ field: 'verification', problem: verified.problem });
	const scale = checkScale({
		id,
		name: typed.name.trim(),
		unit: typed.unit,
		division: division.value,
		verification: verified.value,
		accuracyClass: typed.accuracyClass === '' ? null : typed.accuracyClass,
		checkedOn: typed.checkedOn === '' ? null : typed.checkedOn
	});
	if (scale.ok) return ok(scale.value);
	return fail({ field: scale.problem.kind === 'scale-name-missing' ? 'name' : 'verification', problem: scale.problem });
}
