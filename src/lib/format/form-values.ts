import { z } from 'zod';
import { blankOf, elementOf, kindOfField, limitsOf, metaOfField, shapeOf, unwrapField } from './form-fields';
import { writeNumber } from './numbers';
import { parseDecimal } from './parse';
import { parseMeasure } from './units';

/** What stands in the boxes: text as it was typed, and ticks. Parts are named "legs.0.minutes". */
export type FormValues = Record<string, string | boolean>;

type Entry = FormDataEntryValue | boolean | undefined;
export type FormEntries = Record<string, Entry>;

export interface FormProblem {
	/** Dotted: "legs.0.minutes"; empty when it concerns the form as a whole. */
	path: string;
	message: string;
}

export type ParsedForm<T> = { data: T } | { errors: FormProblem[]; values: FormValues };

const under = (prefix: string, key: string | number): string => (prefix ? `${prefix}.${key}` : String(key));

function visitFields(schema: z.ZodType, data: unknown, prefix: string, values: FormValues): void {
	const kind = kindOfField(schema);
	if (kind === 'object') {
		for (const [key, field] of Object.entries(shapeOf(schema))) {
			visitFields(field, (data as Record<string, unknown> | undefined)?.[key], under(prefix, key), values);
		}
	} else if (kind === 'array') {
		const element = elementOf(schema);
		if (element && Array.isArray(data))
			data.forEach((item, index) => visitFields(element, item, under(prefix, index), values));
	} else if (kind === 'tick') {
		values[prefix] = data === true;
	} else {
		values[prefix] = typeof data === 'number' ? writeNumber(data) : String(data ?? '');
	}
}

/** What the boxes of a form show for this data; a missing value is an empty box. */
export function toFormValues<S extends z.ZodObject>(schema: S, data: Partial<z.input<S>>): FormValues {
	const values: FormValues = {};
	visitFields(schema, data, '', values);
	return values;
}

/** Fields of a form as superforms holds them: numbers are text until they are parsed. Parts are the caller's. */
export function formShape<S extends z.ZodObject>(schema: S) {
	const shape: Record<string, z.ZodDefault<z.ZodString> | z.ZodDefault<z.ZodBoolean>> = {};
	for (const [key, field] of Object.entries(shapeOf(schema))) {
		const kind = kindOfField(field);
		if (kind === 'object' || kind === 'array') continue;
		shape[key] = kind === 'tick' ? z.boolean().default(false) : z.string().default('');
	}
	return z.object(shape) as unknown as z.ZodObject<{
		[K in keyof S['shape']]: z.ZodDefault<
			NonNullable<z.output<S['shape'][K]>> extends boolean ? z.ZodBoolean : z.ZodString
		>;
	}>;
}

const isTicked = (entry: Entry): boolean =>
	entry === true || (typeof entry === 'string' && !['', 'false', 'off'].includes(entry));

const textOf = (entry: Entry): string => (typeof entry === 'string' ? entry : '');

/** Reads one form against a schema, keeping what was typed and collecting what is no number. */
class FormReader {
	readonly values: FormValues = {};
	readonly problems: FormProblem[] = [];

	constructor(private readonly entries: FormEntries) {}

	/** `name` is what the form calls the field; `path` the same with lists counted without gaps. */
	read(schema: z.ZodType, name: string, path: string): unknown {
		const kind = kindOfField(schema);
		if (kind === 'object') {
			const fields = Object.entries(shapeOf(schema));
			return Object.fromEntries(
				fields.map(([key, field]) => [key, this.read(field, under(name, key), under(path, key))])
			);
		}
		if (kind === 'array') return this.readList(schema, name, path);
		if (kind === 'tick') return (this.values[path] = isTicked(this.entries[name]));
		const text = (this.values[path] = textOf(this.entries[name]));
		return kind === 'number' ? this.readNumber(schema, text, path) : readText(schema, text);
	}

	private readList(schema: z.ZodType, name: string, path: string): unknown[] {
		const element = elementOf(schema);
		if (!element) return [];
		return listIndexes(this.entries, `${name}.`).map((index, place) =>
			this.read(element, under(name, index), under(path, place))
		);
	}

	private readNumber(schema: z.ZodType, text: string, path: string): unknown {
		const { label = 'This', unit } = metaOfField(schema);
		if (text.trim() === '') {
			if (!schema.isOptional() && !schema.isNullable())
				this.problems.push({ path, message: `${label} is missing.` });
			return blankOf(schema);
		}
		const value = unit ? parseMeasure(text, unit) : parseDecimal(text);
		if (value !== null) return value;
		// A field may also take a word in place of a number, such as that nobody knows.
		if (schema.safeParse(text.trim()).success) return text.trim();
		this.problems.push({ path, message: `${label} must be ${sayNumber(schema)}.` });
		return undefined;
	}
}

/** "a number of mm from 0 to 2000". */
function sayNumber(schema: z.ZodType): string {
	const { unit } = metaOfField(schema);
	const limits = limitsOf(schema);
	const range = limits ? ` from ${writeNumber(limits.least)} to ${writeNumber(limits.most)}` : '';
	return `a number${unit ? ` of ${unit}` : ''}${range}`;
}

function listIndexes(entries: FormEntries, start: string): number[] {
	const indexes = Object.keys(entries)
		.filter((name) => name.startsWith(start))
		.map((name) => Number(name.slice(start.length).split('.')[0]))
		.filter((index) => Number.isInteger(index) && index >= 0);
	return [...new Set(indexes)].sort((a, b) => a - b);
}

/** An empty text is a text; an empty choice is no choice. */
function readText(schema: z.ZodType, text: string): unknown {
	const isPlainText = unwrapField(schema) instanceof z.ZodString && !schema.isOptional();
	return text === '' && !isPlainText ? blankOf(schema) : text;
}

/** Words for what a schema does not word itself. */
function sayIssue(schema: z.ZodType): z.core.$ZodErrorMap {
	return (issue) => {
		const label = labelAt(schema, issue.path ?? []);
		if (issue.input === undefined || issue.input === '') return `${label} is missing.`;
		if (issue.code === 'invalid_value' || issue.code === 'invalid_union')
			return `${label}: choose one of the answers.`;
		if (issue.code === 'too_small') return `${label} must be at least ${String(issue.minimum)}.`;
		if (issue.code === 'too_big') return `${label} must be at most ${String(issue.maximum)}.`;
		return `${label} cannot be used as it stands.`;
	};
}

function labelAt(schema: z.ZodType, path: PropertyKey[]): string {
	const field = path.reduce<z.ZodType | undefined>(
		(at, key) => at && (kindOfField(at) === 'array' ? elementOf(at) : shapeOf(at)[String(key)]),
		schema
	);
	return (field && metaOfField(field).label) ?? 'This';
}

/**
 * Reads what people typed: numbers in their own units and spellings, ticks, choices; then the whole schema.
 * Gives the data, or every error beside what was typed, so that nothing is lost.
 */
export function parseForm<S extends z.ZodObject>(schema: S, entries: FormEntries): ParsedForm<z.output<S>> {
	const reader = new FormReader(entries);
	const result = schema.safeParse(reader.read(schema, '', ''), { error: sayIssue(schema) });
	if (result.success && reader.problems.length === 0) return { data: result.data };
	const unreadable = new Set(reader.problems.map((problem) => problem.path));
	const issues = (result.error?.issues ?? [])
		.map(({ path, message }) => ({ path: path.map(String).join('.'), message }))
		.filter((issue) => !unreadable.has(issue.path));
	return { errors: inFormOrder([...reader.problems, ...issues], reader.values), values: reader.values };
}

/** As the boxes stand on the page; what concerns the whole comes last. */
function inFormOrder(problems: FormProblem[], values: FormValues): FormProblem[] {
	const places = new Map(Object.keys(values).map((path, place) => [path, place]));
	const placeOf = (problem: FormProblem): number => places.get(problem.path) ?? places.size;
	return problems.sort((a, b) => placeOf(a) - placeOf(b));
}
