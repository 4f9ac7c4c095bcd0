/** What the model has of the moment at which a battery went dark. */
export interface Moment {
	soc: number;
	/** Battery current, A, positive charging. */
	currentA: number;
	capacityAh: number;
	cellsC: number;
	ambientC: number;
	/** How long it was dark as reported, h; null when nobody knows. */
	darkHours: number | null;
	engineOn: boolean;
}

/** Something else that makes a battery go dark. */
export interface OtherCause {
	key: string;
	/** As it is said to people. */
	label: string;
	/** What to measure, in a sentence. */
	measure: string;
	/** 0…1: how well it fits the moment. Engineering judgement, no source. */
	weigh: (moment: Moment) => number;
}

const isShort = ({ darkHours }: Moment): boolean => darkHours !== null && darkHours < 0.5;
const cRateOf = ({ currentA, capacityAh }: Moment): number => Math.abs(currentA) / capacityAh;

/** Other causes than heat. What they weigh is judgement; the order is what is asked for. */
export const OTHER_CAUSES: readonly OtherCause[] = [
	{
		key: 'low-voltage',
		label: 'the battery was empty, and came back with the charger',
		measure:
			'State of charge on the monitor, and the voltage at rest, as soon as it is dark. Check the count of the monitor with one full charge.',
		weigh: (moment) => (moment.soc < 0.1 ? 0.9 : moment.soc < 0.25 ? 0.5 : 0.1) * (moment.engineOn ? 0.3 : 1)
	},
	{
		key: 'overcurrent',
		label: 'one load drew more than the BMS allows',
		measure: 'A clamp meter on the cable while the largest load starts; which loads ran when it went dark.',
		weigh: (moment) => (cRateOf(moment) > 0.5 ? 0.6 : isShort(moment) ? 0.5 : 0.15)
	},
	{
		key: 'cell-imbalance',
		label: 'one cell was full before the others while charging',
		measure:
			'Voltage of each cell near the end of a slow charge, where the BMS shows it; how often it cuts off when full.',
		weigh: (moment) => (moment.currentA >= 0 && moment.soc > 0.95 ? 0.6 : moment.soc > 0.9 ? 0.3 : 0.05)
	},
	{
		key: 'cold',
		label: 'the cells were too cold to be charged',
		measure: 'A thermometer on the case in the morning, before the engine starts.',
		weigh: ({ cellsC }) => (cellsC < 5 ? 0.6 : cellsC < 10 ? 0.2 : 0.01)
	},
	{
		key: 'hot-joint',
		label: 'a joint or a fuse grew hot and let go',
		measure:
			'Millivolts across each joint and the fuse at full charging current; a thermometer gun along the cable.',
		weigh: (moment) => (Math.abs(moment.currentA) > 20 ? 0.4 : 0.2)
	},
	{
		key: 'charger',
		label: 'the charger or the isolator stopped in the heat, not the battery',
		measure: 'Voltage at the battery terminals and at the charger while it is dark: which side is dead.',
		weigh: ({ engineOn }) => (engineOn ? 0.35 : 0.1)
	}
];

export type RankedCause = Pick<OtherCause, 'key' | 'label' | 'measure'> & { weight: number };

/** The other causes, the likeliest first; equal ones in the order of the table. */
export function rankOtherCauses(moment: Moment): RankedCause[] {
	return OTHER_CAUSES.map(({ key, label, measure, weigh }) => ({
		key,
		label,
		measure,
		weight: weigh(moment)
	})).sort((a, b) => b.weight - a.weight);
}
