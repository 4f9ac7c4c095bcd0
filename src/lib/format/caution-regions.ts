export const REGION_KEYS = [
	'elsewhere',
	'australia-new-zealand',
	'european-union',
	'united-kingdom',
	'north-america'
] as const;
export type RegionKey = (typeof REGION_KEYS)[number];

export interface Region {
	/** As in "Rules in …". */
	label: string;
	/** Rules that exist, by their public names; which apply, and in which edition, nobody is told here. */
	rules: { name: string; about: string }[];
}

/** Source of every name: from memory. Only such as are sure to exist; none of them is quoted. */
export const REGIONS: Record<RegionKey, Region> = {
	elsewhere: { label: 'your country', rules: [] },
	'australia-new-zealand': {
		label: 'Australia and New Zealand',
		rules: [
			{ name: 'AS/NZS 3001', about: 'electrical installations of caravans and motor homes' },
			{ name: 'VSB 14', about: 'modification of light vehicles, Australia' }
		]
	},
	'european-union': {
		label: 'the European Union',
		rules: [{ name: 'EN 1648', about: '12 V installations of caravans and motor caravans' }]
	},
	'united-kingdom': {
		label: 'the United Kingdom',
		rules: [
			{ name: 'BS EN 1648', about: '12 V installations of caravans and motor caravans' },
			{ name: 'BS 7671, section 721', about: 'mains installations of caravans' }
		]
	},
	'north-america': {
		label: 'North America',
		rules: [
			{ name: 'NFPA 1192', about: 'recreational vehicles, United States' },
			{ name: 'NFPA 70, article 551', about: 'wiring of recreational vehicles, United States' },
			{ name: 'CSA Z240 RV', about: 'recreational vehicles, Canada' }
		]
	}
};

/** What a region adds to the cautions. */
export function sayRegion(key: RegionKey): { title: string; text: string } {
	const { label, rules } = REGIONS[key];
	const title = `Rules in ${label}`;
	if (rules.length === 0) {
		return {
			title,
			text: 'Ask which rules hold for wiring and for changes to a vehicle where it is registered.'
		};
	}
	const named = rules.map(({ name, about }) => `${name} (${about})`).join(', ');
	return {
		title,
		text: `There are, by name, ${named}. Named from memory and not all there are: whoever does the work looks up which apply, and in which edition.`
	};
}
