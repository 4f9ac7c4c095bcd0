import { z } from 'zod';
import type { FieldMeta } from '../schemas/fields';

/** How a field is written in a form: as text that is a number, as text, as a box to tick, or in parts. */
export type FieldKind = 'number' | 'text' | 'tick' | 'object' | 'array';

interface Def {
	type: string;
	innerType?: z.ZodType;
	in?: z.ZodType;
	options?: z.ZodType[];
	values?: unknown[];
	element?: z.ZodType;
}

const WRAPPERS = new Set(['optional', 'nullable', 'default', 'prefault', 'catch', 'readonly', 'nonoptional']);

const defOf = (schema: z.ZodType): Def => schema.def as unknown as Def;

/** The schema inside its wrappers: optional, default, a pipe's entrance and the like. */
export function unwrapField(schema: z.ZodType): z.ZodType {
	const { type, innerType, in: entrance } = defOf(schema);
	if (WRAPPERS.has(type) && innerType) return unwrapField(innerType);
	return type === 'pipe' && entrance ? unwrapField(entrance) : schema;
}

export function kindOfField(schema: z.ZodType): FieldKind {
	const inner = unwrapField(schema);
	const { type, options = [], values } = defOf(inner);
	if (type === 'number' || type === 'int') return 'number';
	if (type === 'boolean') return 'tick';
	if (type === 'object' || type === 'array') return type;
	if (type === 'literal') return typeof values?.[0] === 'boolean' ? 'tick' : 'text';
	return type === 'union' && options.some((option) => kindOfField(option) === 'number') ? 'number' : 'text';
}

/** The fields of an object schema; a refined object has the same. */
export function shapeOf(schema: z.ZodType): Record<string, z.ZodType> {
	const inner = unwrapField(schema);
	return 'shape' in inner ? (inner.shape as Record<string, z.ZodType>) : {};
}

export function elementOf(schema: z.ZodType): z.ZodType | undefined {
	return defOf(unwrapField(schema)).element;
}

/** Label and unit, wherever in the wrappers they were written. */
export function metaOfField(schema: z.ZodType): Partial<FieldMeta> {
	const { innerType, in: entrance } = defOf(schema);
	const deeper = innerType ?? (defOf(schema).type === 'pipe' ? entrance : undefined);
	return { ...(deeper ? metaOfField(deeper) : {}), ...(schema.meta() as Partial<FieldMeta> | undefined) };
}

/** What an empty box stands for, by the outermost wrapper that says so. */
export function blankOf(schema: z.ZodType): null | undefined {
	const { type, innerType } = defOf(schema);
	if (type === 'nullable') return null;
	return innerType && type === 'optional' ? blankOf(innerType) : undefined;
}

const isLimit = (value: number | null): value is number =>
	value !== null && Number.isFinite(value) && Math.abs(value) < Number.MAX_SAFE_INTEGER;

/** The least and the most that a number may be; null where either is open. */
export function limitsOf(schema: z.ZodType): { least: number; most: number } | null {
	const inner = unwrapField(schema);
	if (!(inner instanceof z.ZodNumber)) {
		const number = defOf(inner).options?.find((option) => kindOfField(option) === 'number');
		return number ? limitsOf(number) : null;
	}
	const { minValue: least, maxValue: most } = inner;
	return isLimit(least) && isLimit(most) ? { least, most } : null;
}

/** The label of each field of an object schema; a field without one is left out. */
export function labelsOf(schema: z.ZodType): Record<string, string> {
	return Object.fromEntries(
		Object.entries(shapeOf(schema)).flatMap(([name, field]) => {
			const { label } = metaOfField(field);
			return label ? [[name, label]] : [];
		})
	);
}
