/** Changes with every change of the words below: an acknowledgement is tied to what was read. */
export const CAUTION_TEXT_VERSION = 1;

export interface Caution {
	id: string;
	title: string;
	text: string;
	when: 'always' | 'lithium';
}

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
	{
		id: 'failing-lithium',
		title: 'Toxic and flammable gas',
		text: 'A failing lithium battery gives off gas that poisons and burns. Do not breathe it, move people away and call the fire service.',
		when: 'lithium'
	},
	{
		id: 'stop-using',
		title: 'When to stop using a battery',
		text: 'Stop using a battery that is swollen, leaking or damaged, or that was over its limits, and have it checked.',
		when: 'always'
	}
];

/** The cautions that a battery of this chemistry calls for, in their order. */
export function listCautions(chemistry: string): Caution[] {
	const isLithium = chemistry.startsWith('lithium');
	return CAUTIONS.filter((caution) => caution.when === 'always' || isLithium);
}
