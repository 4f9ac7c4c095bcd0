import { renderDayRibbonSvg } from '$lib/components/charts/day-ribbon/render-day-ribbon';
import { spellOut } from './scripts';
import type { RibbonData } from '$lib/components/charts/day-ribbon/ribbon-data';

const HALO_TEXT = /<text\b[^>]*\bpaint-order="stroke"[^>]*>[\s\S]*?<\/text>/g;
const STROKE = /\s(?:paint-order|stroke(?:-[a-z]+)?)="[^"]*"/g;

/**
 * Words with a halo drawn as two: first the halo, then the words. A document knows no order of painting and would
 * lay the halo over the words.
 */
export const layHalosBelow = (svg: string): string =>
	svg.replace(HALO_TEXT, (text) => {
		const [tag] = /^<text\b[^>]*>/.exec(text)!;
		return text + text.replace(tag, tag.replace(STROKE, ''));
	});

/** The day in black and white, for a document. */
export const drawRibbon = (data: RibbonData): string =>
	spellOut(layHalosBelow(renderDayRibbonSvg(data, { size: 'print', scheme: 'print', idPrefix: 'day' })));
