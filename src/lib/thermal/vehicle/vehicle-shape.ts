import { keyOf, planSlots } from '../network/step-generator/slots';
import { STEFAN_BOLTZMANN } from '../correlations/radiation';
import type { NetworkShape } from '../network/shape';
import { hasLink } from './describe-vehicle';
import { DRIVEN, FIXED, LINKS, MIXED, SOURCES, STORED, SUNLIT, type Setting } from './network-table';

/** The shape of the vehicle's network, with the shield's node or without. */
export function shapeVehicle(shielded: boolean): NetworkShape {
	return {
		stored: Object.keys(STORED).filter((name) => shielded || name !== 'shield'),
		fixed: Object.keys(FIXED),
		mixed: Object.entries(MIXED).map(([name, { parts }]) => ({ name, parts: Object.keys(parts) })),
		links: LINKS.filter((link) => hasLink(link, shielded)).map(({ name, kind, from, to, gate }) => ({
			name,
			kind,
			from,
			to,
			...(gate ? { carryTo: gate.carryTo } : {})
		})),
		sources: SOURCES.map(({ name, kind, node }) => ({ name, kind, node })),
		driven: {
			bent: Object.keys(DRIVEN).filter((name) => !SUNLIT.has(name)),
			lit: Object.keys(DRIVEN).filter((name) => SUNLIT.has(name))
		}
	};
}

type Read = (setting: Setting) => number;

/** Every value that holds for a leg, by its key, as the tables have it. */
function listReaders(shielded: boolean): [key: string, read: Read][] {
	const links = LINKS.filter((link) => hasLink(link, shielded));
	return [
		...Object.entries(STORED).map(([node, read]): [string, Read] => [
			keyOf.capacity(node),
			({ scenario }) => read(scenario)
		]),
		...Object.entries(FIXED).flatMap(([node, read]): [string, Read][] =>
			read === 'driven' ? [] : [[keyOf.temp(node), read]]
		),
		...Object.entries(MIXED).flatMap(([node, { offset, parts }]): [string, Read][] => [
			...(offset === 'driven' ? [] : [[keyOf.offset(node), offset] as [string, Read]]),
			...Object.entries(parts).map(([part, read]): [string, Read] => [keyOf.weight(node, part), read])
		]),
		...links.flatMap(({ name, kind, size }): [string, Read][] => {
			if (size === 'driven') return [];
			const read: Read = kind === 'radiation' ? (setting) => STEFAN_BOLTZMANN * size(setting) : size;
			return [[keyOf.size(name), read]];
		}),
		...links.flatMap(({ name, gate }): [string, Read][] => {
			if (!gate) return [];
			const { openC, fullC, carryShare } = gate;
			return [
				[keyOf.open(name), openC],
				[keyOf.perWidth(name), (setting) => 1 / (fullC(setting) - openC(setting))],
				[keyOf.share(name), carryShare]
			];
		}),
		...SOURCES.flatMap(({ name, r25Ohm, activationK }): [string, Read][] =>
			r25Ohm && activationK
				? [
						[keyOf.r25(name), r25Ohm],
						[keyOf.activation(name), activationK]
					]
				: []
		)
	];
}

/** How the values of a leg come into the array that a generated step reads. */
export function planFilling(shielded: boolean): {
	size: number;
	fill: (values: Float64Array, setting: Setting) => void;
} {
	const { constants } = planSlots(shapeVehicle(shielded));
	const readers = new Map(listReaders(shielded));
	const ordered = [...constants].map(([key, place]) => {
		const read = readers.get(key);
		if (!read) throw new RangeError(`nothing in the tables says the ${key}`);
		return { read, place };
	});
	return {
		size: constants.size,
		fill: (values, setting) => {
			for (let k = 0; k < ordered.length; k++) values[ordered[k]!.place] = ordered[k]!.read(setting);
		}
	};
}
