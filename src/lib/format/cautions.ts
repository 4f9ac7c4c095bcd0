import { findChemistry, type ChemistryCaution } from '../thermal/chemistries';

/** Changes with every change of the words below: an acknowledgement is tied to what was read. */
export const CAUTION_TEXT_VERSION = 2;

export interface Caution {
	id: string;
	title: string;
	text: string;
	/** Of some chemistries the table of chemistries says so under this id. */
	when: 'always' | 'by-chemistry';
}

/** Those that the table of chemistries asks for. */
const BY_CHEMISTRY: Record<ChemistryCaution, Pick<Caution, 'title' | 'text'>> = {
	'failing-lithium': {
		title: 'Toxic and flammable gas',
		text: 'A failing lithium battery gives off gas that poisons and burns. Do not breathe it, move people away and call the fire service.'
	},
	'fierce-fire': {
		title: 'A fire of this kind is fierce',
		text: 'Lithium cells with nickel and cobalt fail at lower temperatures than those with iron phosphate, and burn far hotter. Ask the maker in writing whether the place under the bonnet is allowed at all.'
	},
	'vent-flooded': {
		title: 'Vent it to the open',
		text: 'A flooded battery gives off hydrogen whenever it charges. Never put it in a closed box or where people sit or sleep, unless openings low and high lead outside; keep relays, switches and anything that sparks away from it.'
	},
	'vent-valve-regulated': {
		title: 'Sealed is not gas-tight',
		text: 'A valve-regulated battery keeps its gas only while it is charged as its maker says. Overcharged or hot it lets hydrogen out: do not shut it into a box without openings that lead outside.'
	},
	'hot-charge': {
		title: 'Charging a hot battery',
		text: 'A lead-acid battery that is charged hot at full voltage gases, dries out and can go on heating itself. The charger must lower its voltage as the battery warms, and stop at the limit of its maker.'
	},
	acid: {
		title: 'Acid',
		text: 'Keep it upright and tied down, wear eye protection, and have water at hand. Acid burns skin, eyes, paint and cables.'
	}
};

/** What every result carries: on the screen, in print and on the customer's sheet, in these words. */
export const CAUTIONS: readonly Caution[] = [
	{
		id: 'estimate',
		title: 'An estimate, not a certificate',
		text: 'This is a calculation from measurements and published figures. A real vehicle on a real day can run hotter or cooler.',
		when: 'always'
	},
	{
		id: 'first-word',
		title: 'Others come first',
		text: 'The instructions and warranty of the battery maker and of the vehicle maker, local rules (such as wiring rules for recreational vehicles and vehicle modification codes) and licensed practice come before anything said here.',
		when: 'always'
	},
	{
		id: 'hot-parts',
		title: 'Hot engine and exhaust',
		text: 'Let them cool before you measure or work near them.',
		when: 'always'
	},
	{
		id: 'stored-energy',
		title: 'Stored energy',
		text: 'A battery drives a very large current through a dropped spanner or a chafed cable. Disconnect before work, take off rings and watches, and cover the terminals.',
		when: 'always'
	},
	{
		id: 'fuse',
		title: 'Fuse at the source',
		text: 'Protect the cable at the battery, with a fuse rated for the heat of the place where it sits.',
		when: 'always'
	},
	{
		id: 'drilling',
		title: 'Before drilling',
		text: 'Know what is behind the panel: wiring, brake and fuel lines, coolant, airbags, structure.',
		when: 'always'
	},
	{
		id: 'hydrogen',
		title: 'Hydrogen',
		text: 'A vented lead-acid battery, the starting battery included, gives off explosive gas while it charges. Keep sparks and flames away and let the gas out to the open.',
		when: 'always'
	},
	...Object.entries(BY_CHEMISTRY).map(([id, words]) => ({ id, ...words, when: 'by-chemistry' as const })),
	{
		id: 'stop-using',
		title: 'When to stop using a battery',
		text: 'Stop using a battery that is swollen, leaking or damaged, or that was over its limits, and have it checked.',
		when: 'always'
	}
];

/** Those that a battery calls for by its chemistry. */
export function listOwnCautions(chemistry: string): Caution[] {
	const own: readonly string[] = findChemistry(chemistry)?.cautions ?? [];
	return CAUTIONS.filter(({ id, when }) => when === 'by-chemistry' && own.includes(id));
}

/** The cautions that a battery of this chemistry calls for, in their order. */
export function listCautions(chemistry: string): Caution[] {
	const own = listOwnCautions(chemistry);
	return CAUTIONS.filter((caution) => caution.when === 'always' || own.includes(caution));
}
