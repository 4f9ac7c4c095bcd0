import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { sampleDay, TOURING_LEGS } from '../testing/sample-day';
import { drawBand } from './axes';
import { cleanSvg } from './clean-svg';
import { drawCurves } from './curves';
import { describeRibbon, hourlyReadings, readRibbon, sayReading } from './describe-ribbon';
import { layOutFrame, RIBBON_SIZES, spanOf, widthToDraw, type RibbonSize } from './frame';
import {
	boxesOverlap,
	boxInside,
	clipSegment,
	hatchPath,
	lengthInside,
	simplifyLine,
	widthOf
} from './geometry';
import { layOutLimits } from './limits';
import type { Mark } from './marks';
import { moveHour } from './move-hour';
import { RIBBON_PALETTES } from './palette';
import { placeWords, spreadColumn, wordsBox } from './place-words';
import { drawRibbonPictures, renderDayRibbonSvg } from './render-day-ribbon';
import { endHourOf, nameLeg, valueAt } from './ribbon-data';
import { drawStrip } from './strip';
import { estimateTextWidth } from './text-width';
import { drawWords } from './words';

const SIZES = Object.keys(RIBBON_SIZES) as RibbonSize[];
const DAYS = {
	hot: sampleDay({ band: true }),
	cool: sampleDay({ exposure: 0.5 }),
	board: sampleDay({ sensor: 'board' }),
	'no BMS': sampleDay({ limits: { highestUseC: 60, highestChargeC: 50 } }),
	'limits close by': sampleDay({ limits: { highestUseC: 60, highestChargeC: 59 } }),
	'never back': sampleDay({ exposure: 1.3, legs: TOURING_LEGS.slice(0, -1) }),
	'three days': sampleDay({ legs: [...TOURING_LEGS, ...TOURING_LEGS, ...TOURING_LEGS] }),
	'half an hour': sampleDay({ legs: TOURING_LEGS.slice(2, 3) })
};
const CASES = Object.entries(DAYS).flatMap(([name, day]) => SIZES.map((size) => ({ name, day, size })));
const svgOf = (day = DAYS.hot, size: RibbonSize = 'desk') =>
	renderDayRibbonSvg(day, { size, scheme: 'page', idPrefix: 'a' });

describe('the drawing', () => {
	it.each(CASES)('of a $name day at $size styles nothing inline and has no holes', ({ day, size }) => {
		const svg = svgOf(day, size);
		expect(svg).not.toMatch(/style=|<style|class=|NaN|undefined|ecmeta/);
		expect(svg.match(/<svg/g)).toHaveLength(1);
		expect(svg.endsWith('</svg>')).toBe(true);
	});

	it('scales by its view box and says what it shows', () => {
		expect(svgOf()).toMatch(
			/^<svg [^>]*viewBox="0 0 1100 380" role="img" aria-label="Temperatures from 07:30/
		);
	});

	it('is the same for the same day, so that the server and a second look agree', () => {
		expect(svgOf()).toBe(svgOf());
	});

	it('starts every id with its prefix and refers to none that is missing', () => {
		const svg = svgOf();
		const ids = [...svg.matchAll(/ id="([^"]+)"/g)].map(([, id]) => id);
		const uses = [...svg.matchAll(/url\(#([^)]+)\)/g)].map(([, id]) => id);
		expect(ids.length).toBeGreaterThan(0);
		expect(ids.every((id) => id?.startsWith('a-'))).toBe(true);
		expect(ids).toEqual(expect.arrayContaining(uses));
	});

	it('uses no colour but black, white and greys for paper', () => {
		const { print = '' } = drawRibbonPictures(DAYS.hot, ['print'], 'p');
		const colours = [...print.matchAll(/(?:fill|stroke|stop-color)="(#[0-9a-fA-F]+|[a-z]+[^"]*)"/g)].map(
			([, c]) => c ?? ''
		);
		const grey = /^(#(..)\2\2|#(.)\3\3|none|url\(.*\))$/i;
		expect(colours.length).toBeGreaterThan(50);
		expect(colours.filter((colour) => !grey.test(colour))).toEqual([]);
	});

	it('hatches the dark hours and only those', () => {
		const hatches = (svg: string) => (svg.match(/stroke-width="0.6"/g) ?? []).length;
		expect(hatches(svgOf(DAYS.hot))).toBeGreaterThan(0);
		expect(hatches(svgOf(DAYS.cool))).toBe(0);
	});

	it('shows the charge limits only where heat stops the charge', () => {
		expect(svgOf(DAYS.hot)).toContain('charge stops at');
		expect(svgOf(DAYS.cool)).not.toContain('charge stops at');
	});

	it('shows how hot a battery without a BMS may be, and nothing that would switch it off', () => {
		const svg = svgOf(DAYS['no BMS']);
		expect(svg).toContain('too hot above');
		expect(svg).toContain('no charge above');
		expect(svg).not.toMatch(/dark at|comes back|charge stops/);
		expect(svgOf(DAYS['no BMS'], 'phone')).toContain('too hot');
	});
});

describe('the band', () => {
	const frame = layOutFrame(DAYS.hot, 'desk');
	/** Its edges from left to right: above, then below. */
	const edgesOf = (mark: Mark): { x: number; y: number }[] =>
		mark.kind === 'band'
			? [...mark.d.matchAll(/([\d.]+) ([\d.]+)/g)].map(([, x, y]) => ({ x: Number(x), y: Number(y) }))
			: [];
	const spanAt = (mark: Mark, x: number): number => {
		const ys = edgesOf(mark)
			.filter((point) => Math.abs(point.x - x) < 12)
			.map(({ y }) => y);
		return Math.max(...ys) - Math.min(...ys);
	};

	it('is drawn wide and, on top of it, narrow: the part in both is the darker one', () => {
		const [wide, narrow] = drawBand(frame, DAYS.hot);
		const atPeak = frame.x(DAYS.hot.peakAtHour);
		expect(spanAt(wide!, atPeak)).toBeGreaterThan(2 * spanAt(narrow!, atPeak));
		expect(svgOf(DAYS.hot).match(/fill-opacity="0\.22"/g)).toHaveLength(2);
		expect(drawBand(frame, DAYS.cool)).toEqual([]);
	});

	it('may have fewer points than the curves, and ends where they end', () => {
		const { band, curves } = DAYS.hot;
		const third = (valuesC: number[]) => valuesC.filter((_, at) => at % 3 === 0);
		const sparse = { ...DAYS.hot, band: { ...band!, stepMin: 3 * band!.stepMin } };
		for (const edge of ['lowC', 'lowerC', 'upperC', 'highC'] as const) sparse.band[edge] = third(band![edge]);
		const xs = edgesOf(drawBand(frame, sparse)[0]!).map(({ x }) => x);
		expect(Math.max(...xs)).toBeGreaterThan(frame.x(endHourOf(curves)) - 3);
	});

	it('is told in words at the hottest hour', () => {
		expect(describeRibbon(DAYS.hot)).toMatch(
			/At \d\d:\d\d half of all days lie between \d\d\u202F°C and \d\d\u202F°C, nine in ten between \d\d\u202F°C and \d\d\u202F°C\.$/
		);
		expect(describeRibbon(DAYS.cool)).not.toContain('nine in ten');
	});
});

describe('what the chart library wrote', () => {
	const root = { width: 10, height: 5, label: 'a "b" <c> & d', idPrefix: 'q' };
	const given =
		'<svg width="10" style="position:absolute"><text style="font-size:12px;font-family:Roboto;cursor:default;" class="zr3-cls-0">x</text>' +
		'<path stroke="url(#zr3-g0)"></path><style ><![CDATA[.zr3-cls-0{a:b}]]></style></svg>';

	it('becomes presentation attributes', () => {
		expect(cleanSvg(given, root)).toContain('<text font-size="12" font-family="Roboto">x</text>');
	});
	it('gets our ids and loses its style element', () => {
		expect(cleanSvg(given, root)).toContain('<path stroke="url(#q-g0)"></path></svg>');
	});
	it('says its label with nothing that ends an attribute', () => {
		expect(cleanSvg(given, root)).toContain('aria-label="a &quot;b&quot; &lt;c&gt; &amp; d"');
	});
});

describe('the words', () => {
	it.each(CASES)('of a $name day at $size touch neither each other nor the edge', ({ day, size }) => {
		const frame = layOutFrame(day, size);
		const marks = drawWords(frame, day, drawCurves(frame, day), layOutLimits(frame, day));
		const boxes = marks.flatMap((mark) =>
			mark.kind === 'words' ? [wordsBox(mark.text, mark, mark.fontPx, mark.bold)] : []
		);
		const paper = { left: 0, top: 0, right: frame.width, bottom: frame.height };
		const pairs = boxes.flatMap((a, i) => boxes.slice(i + 1).map((b) => [a, b] as const));
		expect(boxes.filter((box) => !boxInside(box, paper))).toEqual([]);
		expect(
			pairs.filter(([a, b]) => boxesOverlap(a, { ...b, top: b.top + 1.5, bottom: b.bottom - 1.5 }))
		).toEqual([]);
	});

	it.each(CASES)('in the strip of a $name day at $size stay inside their leg', ({ day, size }) => {
		const frame = layOutFrame(day, size);
		const marks = drawStrip(frame, day);
		const legs = marks.flatMap((mark) => (mark.kind === 'box' ? [mark.box] : []));
		const words = marks.flatMap((mark) =>
			mark.kind === 'words' ? [wordsBox(mark.text, mark, mark.fontPx)] : []
		);
		const loose = words.filter((box) => !legs.some((leg) => box.left >= leg.left && box.right <= leg.right));
		expect(loose).toEqual([]);
	});

	it.each(CASES)('under the hours of a $name day at $size keep apart and inside', ({ day, size }) => {
		const { ticks, spec, width } = layOutFrame(day, size);
		const boxes = ticks.map(({ word, x, align }) => wordsBox(word, { x, y: 0, align }, spec.fontPx));
		expect(boxes.every(({ left, right }) => left >= 0 && right <= width)).toBe(true);
		expect(boxes.every((box, i) => i === 0 || box.left > (boxes[i - 1]?.right ?? 0) + 2)).toBe(true);
	});

	it('are left out when every spot is taken', () => {
		const bounds = { left: 0, top: 0, right: 100, bottom: 100 };
		const taken = { lines: [], boxes: [bounds], bounds };
		expect(placeWords('case', [{ x: 50, y: 50, align: 'center' }], taken, { fontPx: 12 })).toBeNull();
	});

	it('prefer the spot that crosses no line', () => {
		const bounds = { left: 0, top: 0, right: 100, bottom: 100 };
		const line = [
			{ x: 0, y: 30 },
			{ x: 100, y: 30 }
		];
		const spots = [30, 70].map((y) => ({ x: 50, y, align: 'center' as const }));
		expect(
			placeWords('case', spots, { lines: [{ line, costPerPx: 1 }], boxes: [], bounds }, { fontPx: 12 })?.y
		).toBe(70);
	});

	it('of limits that are close are pushed apart in their order', () => {
		const [a = 0, b = 0, c = 0] = spreadColumn([50, 52, 20], 14, 0, 100);
		expect(b - a).toBeGreaterThanOrEqual(14 - 1e-6);
		expect(c).toBe(20);
	});

	it('are about as wide as measured in the browser: "midnight" 12 px is 45 px', () => {
		expect(estimateTextWidth('midnight', 12)).toBeGreaterThan(43);
		expect(estimateTextWidth('midnight', 12)).toBeLessThan(49);
	});
});

describe('the axes', () => {
	it('say the hours as people do', () => {
		expect(layOutFrame(DAYS.hot, 'desk').ticks.map(({ word }) => word)).toEqual([
			'08',
			'10',
			'noon',
			'14',
			'16',
			'18',
			'20',
			'22',
			'midnight'
		]);
	});
	it('have fewer ticks on a phone', () => {
		expect(layOutFrame(DAYS.hot, 'phone').ticks.length).toBeLessThan(
			layOutFrame(DAYS.hot, 'desk').ticks.length
		);
	});
	it.each(CASES)('hold every curve of a $name day at $size', ({ day, size }) => {
		const frame = layOutFrame(day, size);
		const points = drawCurves(frame, day).flatMap(({ line }) => line);
		const { left, right, top, bottom } = frame.plot;
		expect(points.filter(({ x, y }) => x < left - 0.01 || x > right + 0.01 || y < top || y > bottom)).toEqual(
			[]
		);
	});
	it('are the same for days that stand side by side', () => {
		const days = [DAYS.hot, DAYS.cool];
		const [hot, cool] = days.map(
			(day, i) => drawRibbonPictures(day, ['wide'], `c-${i}`, 'page', spanOf(days)).wide
		);
		const limit = /d="(M38 [\d.]+L624 [\d.]+)" fill="none" stroke="var\(--color-ink\)" stroke-width="1.5">/;
		expect(hot?.match(limit)?.[1]).toBeTruthy();
		expect(cool?.match(limit)?.[1]).toBe(hot?.match(limit)?.[1]);
		expect(spanOf([DAYS.hot, DAYS.cool]).maxC).toBeGreaterThanOrEqual(spanOf([DAYS.cool]).maxC);
	});
	it('are drawn at the size’s own width when the room is close to it', () => {
		expect([280, 360, 500].map((room) => widthToDraw('phone', room))).toEqual([340, 340, 500]);
	});
});

describe('geometry', () => {
	const box = { left: 0, top: 0, right: 10, bottom: 10 };
	it('clips a diagonal to the box it crosses', () => {
		expect(clipSegment({ x: -10, y: -10 }, { x: 20, y: 20 }, box)).toEqual([1 / 3, 2 / 3]);
	});
	it('measures how much of a line lies in a box', () => {
		expect(
			lengthInside(
				[
					{ x: -5, y: 5 },
					{ x: 5, y: 5 },
					{ x: 5, y: 50 }
				],
				box
			)
		).toBeCloseTo(10, 9);
	});
	it('leaves out points of a straight line and keeps its corners', () => {
		const line = [0, 1, 2, 3, 4].map((x) => ({ x, y: x < 3 ? 0 : x - 2 }));
		expect(simplifyLine(line, 0.01).map(({ x }) => x)).toEqual([0, 2, 4]);
	});
	it('hatches a box without leaving it', () => {
		const numbers = hatchPath({ left: 3, top: 4, right: 20, bottom: 30 }, 5).match(/[\d.]+ [\d.]+/g) ?? [];
		const points = numbers.map((pair) => pair.split(' ').map(Number) as [number, number]);
		expect(points.length).toBeGreaterThan(8);
		expect(points.every(([x, y]) => x >= 3 && x <= 20 && y >= 4 && y <= 30)).toBe(true);
	});
	it('gives no leg a negative width', () => {
		const frame = layOutFrame(DAYS['three days'], 'mini', 300);
		expect(
			drawStrip(frame, DAYS['three days']).every((mark) => mark.kind !== 'box' || widthOf(mark.box) > 0)
		).toBe(true);
	});
});

describe('what a reader is told', () => {
	it('is the peak, the dark hours and the limits', () => {
		expect(describeRibbon(DAYS.hot)).toMatch(
			/hottest at \d\d:\d\d with \d\d\u202F°C\. It is dark from \d\d:\d\d to \d\d:\d\d/
		);
		expect(describeRibbon(DAYS.cool)).toContain('never goes dark');
		expect(describeRibbon(DAYS['never back'])).toContain('to the end of the day');
	});
	it('is the limits of its maker where nothing switches the battery off', () => {
		const words = describeRibbon(DAYS['no BMS']);
		expect(words).toMatch(/Nothing switches this battery off\. It is too hot above 60\u202F°C/);
		expect(words).not.toContain('dark');
	});
	it('is one reading an hour, and the start and the end', () => {
		expect(
			hourlyReadings(DAYS.hot)
				.map(({ hour }) => hour)
				.slice(0, 3)
		).toEqual([7.5, 8, 9]);
		expect(hourlyReadings(DAYS.hot).at(-1)?.hour).toBeCloseTo(24, 6);
	});
	it('is read between two steps of the curve by a straight line', () => {
		const curves = { ...DAYS.hot.curves, startHour: 10, stepMin: 60 };
		expect([9, 10.25, 99].map((hour) => valueAt(curves, [20, 40], hour))).toEqual([20, 25, 40]);
	});
	it('says every value at a moment, and that it is dark', () => {
		const said = sayReading(DAYS.hot, readRibbon(DAYS.hot, 17));
		expect(said).toMatch(/^17:00: cells .*case .*bay air .*outside .*; .*dark$/);
	});
	it('names a leg without a name by what the vehicle does', () => {
		const leg = { fromHour: 0, toHour: 1, surface: 'sealed', bonnetOpen: false } as const;
		const names = [
			[60, true],
			[8, true],
			[0, true],
			[0, false]
		] as const;
		expect(names.map(([speedKmh, engineOn]) => nameLeg({ ...leg, speedKmh, engineOn }))).toEqual([
			'drive',
			'crawl',
			'stop',
			'camp'
		]);
	});
});

describe('the hairline', () => {
	const span = { fromHour: 8, toHour: 20 };
	it('goes five minutes by an arrow, an hour by a page key, and stays in the day', () => {
		expect(moveHour('ArrowRight', 9, span)).toBeCloseTo(9 + 1 / 12, 9);
		expect(moveHour('PageDown', 8.5, span)).toBe(8);
		expect([moveHour('Home', 9, span), moveHour('End', 9, span), moveHour('a', 9, span)]).toEqual([
			8,
			20,
			null
		]);
	});
});

describe('the fixed colours', () => {
	it('are those of the page, by day and by night', () => {
		const css = readFileSync(new URL('../../../../app.css', import.meta.url), 'utf8');
		const heats = [...css.matchAll(/--color-heat-\d: (#[0-9a-f]{6});/g)].map(([, colour]) => colour);
		expect([...RIBBON_PALETTES.light.heat, ...RIBBON_PALETTES.dark.heat]).toEqual(heats);
	});
});
