import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

type Rgb = [number, number, number];
type Matrix = [Rgb, Rgb, Rgb];

const css = readFileSync(new URL('./app.css', import.meta.url), 'utf8');

/** The colours that a block of the style sheet sets, by their names. */
function readTokens(from: string, to: string): Record<string, string> {
	const start = css.indexOf(from);
	const block = css.slice(start, css.indexOf(to, start));
	return Object.fromEntries(
		[...block.matchAll(/--color-([\w-]+): (#[0-9a-f]{6});/g)].map(([, name, hex]) => [name, hex])
	);
}

const light = readTokens('@theme {', '\n}');
const SCHEMES: Record<string, Record<string, string>> = {
	light,
	dark: { ...light, ...readTokens('prefers-color-scheme: dark', '\n}') },
	print: { ...light, ...readTokens('@media print', '\n\t}') }
};

const linear = (channel: number): number =>
	channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;

const toLinear = (hex: string): Rgb =>
	[1, 3, 5].map((at) => linear(parseInt(hex.slice(at, at + 2), 16) / 255)) as Rgb;

/** Relative luminance (IEC 61966-2-1 primaries; WCAG 2.2, "relative luminance"). */
const luminance = ([r, g, b]: Rgb): number => 0.2126 * r + 0.7152 * g + 0.0722 * b;

/** WCAG 2.2, "contrast ratio". */
function contrast(a: string, b: string): number {
	const [low, high] = [luminance(toLinear(a)), luminance(toLinear(b))].sort((x, y) => x - y) as [
		number,
		number
	];
	return (high + 0.05) / (low + 0.05);
}

/** CIE 1976 L* of a luminance whose white is 1. */
const lightness = (y: number): number => (y > 216 / 24389 ? 116 * Math.cbrt(y) - 16 : (y * 24389) / 27);

/** Machado, Oliveira and Fernandes 2009 (IEEE TVCG 15, 6), severity 1.0; on linear RGB. */
const DEFICIENCIES: Record<string, Matrix> = {
	protanopia: [
		[0.152286, 1.052583, -0.204868],
		[0.114503, 0.786281, 0.099216],
		[-0.003882, -0.048116, 1.051998]
	],
	deuteranopia: [
		[0.367322, 0.860646, -0.227968],
		[0.280085, 0.672501, 0.047413],
		[-0.01182, 0.04294, 0.968881]
	],
	tritanopia: [
		[1.255528, -0.076749, -0.178779],
		[-0.078411, 0.930809, 0.147602],
		[0.004733, 0.691367, 0.3039]
	]
};

const seenThrough = (matrix: Matrix, [r, g, b]: Rgb): Rgb =>
	matrix.map((row) => Math.min(1, Math.max(0, row[0] * r + row[1] * g + row[2] * b))) as Rgb;

const HEAT = ['heat-1', 'heat-2', 'heat-3', 'heat-4', 'heat-5'];
const steps = (values: number[]): number[] =>
	values.slice(1).map((value, index) => (values[index] ?? 0) - value);

describe('the yardsticks themselves', () => {
	it('give the published values', () => {
		// WCAG 2.2: black on white is 21 to 1.
		expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 6);
		// CIE 15: the 18.42 % grey is L* 50.
		expect(lightness(0.1841865)).toBeCloseTo(50, 3);
	});

	it.each(Object.entries(DEFICIENCIES))('leave white white (%s)', (_name, matrix) => {
		seenThrough(matrix, [1, 1, 1]).forEach((channel) => expect(channel).toBeCloseTo(1, 5));
	});
});

describe.each(Object.entries(SCHEMES))('the %s colours', (_scheme, colours) => {
	const pick = (name: string): string => colours[name] ?? '';

	it.each([
		['ink', 'paper'],
		['muted', 'paper'],
		['action', 'paper'],
		['on-action', 'action']
	])('%s on %s reads at 4.5 to 1 or better (WCAG 2.2, 1.4.3)', (text, ground) => {
		expect(contrast(pick(text), pick(ground))).toBeGreaterThanOrEqual(4.5);
	});
});

describe.each(['light', 'dark'])('the heat ramp in %s', (scheme) => {
	const colours = HEAT.map((name) => toLinear(SCHEMES[scheme]?.[name] ?? ''));

	it('goes from light to dark by at least 20 in L* a step, so that grey tells the steps apart', () => {
		const gaps = steps(colours.map((colour) => lightness(luminance(colour))));
		expect(gaps).toHaveLength(4);
		expect(Math.min(...gaps)).toBeGreaterThanOrEqual(20);
	});

	it.each(Object.entries(DEFICIENCIES))('keeps its order and its distances under %s', (_name, matrix) => {
		const gaps = steps(colours.map((colour) => lightness(luminance(seenThrough(matrix, colour)))));
		expect(Math.min(...gaps)).toBeGreaterThanOrEqual(18);
	});
});

describe('the style sheet', () => {
	it('names no colour outside its tokens', () => {
		const rules = css.replace(/--[\w-]+:[^;]+;/g, '').replace(/\/\*[\s\S]*?\*\//g, '');
		expect(rules).not.toMatch(/#[0-9a-f]{3,8}\b|rgba?\(|hsla?\(|oklch\(/i);
	});
});
