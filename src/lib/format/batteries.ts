import { CHEMISTRIES, findChemistry } from '../thermal/chemistries';
import { formatTemperature } from './numbers';
import type { BatteryInput, Chemistry, Sensor, UnderBonnetWord } from '../schemas/batteries';

export const CHEMISTRY_WORDS = Object.fromEntries(
	CHEMISTRIES.map(({ key, label }) => [key, label])
) as Record<Chemistry, string>;

export const SENSOR_WORDS: Record<Sensor, string> = {
	cells: 'The cells',
	board: 'Its own board',
	hotter: 'The hotter of the two'
};

interface UnderBonnetText {
	/** As a choice. */
	choice: string;
	/** In a table. */
	short: string;
	/** What to mind when this battery is to go under a bonnet; null when the maker allows it. */
	caution: string | null;
}

/** What a maker's word on under-bonnet use means for whoever fits the battery there. */
export const UNDER_BONNET: Record<UnderBonnetWord, UnderBonnetText> = {
	allowed: { choice: 'Allows it', short: 'allowed', caution: null },
	conditional: {
		choice: 'Allows it on conditions',
		short: 'on conditions',
		caution: 'Read the maker’s conditions before you choose a place under the bonnet, and keep to every one.'
	},
	silent: {
		choice: 'Says nothing about it',
		short: 'not said',
		caution:
			'The maker is silent about under-bonnet use. Ask them in writing before you fit it there: the warranty may not cover it, whatever an estimate says.'
	},
	excluded: {
		choice: 'Excludes it',
		short: 'excluded',
		caution:
			'The maker excludes under-bonnet use. Do not fit it there: no estimate outweighs the maker’s own word, and the warranty ends where it is ignored.'
	}
};

/** "Emberlow Slab 100". */
export const formatBattery = ({ maker, model }: Pick<BatteryInput, 'maker' | 'model'>): string =>
	`${maker} ${model}`;

/** What is usual for a kind of battery, for whoever has no data sheet at hand yet. */
export function sayUsualLimits(key: string): string {
	const chemistry = findChemistry(key);
	if (chemistry?.wear.law !== 'lead-acid') return '';
	const { highestChargeC, highestUseC, wear } = chemistry;
	const charge = formatTemperature(highestChargeC.value);
	const use = formatTemperature(highestUseC.value);
	return `Usual for this kind: charged up to ${charge}, used up to ${use}, ${wear.usualLifeYears.value} years at ${formatTemperature(25)}. The data sheet counts.`;
}
