import { describe } from 'vitest';
import { biot, radiativeConductance } from '../../src/lib/thermal/correlations';
import { checkAgainst, type PublishedValue } from './support/check-against';
import { bodyAt, sphere, timeTo, type Body } from './support/lumped-body';

/** Handbook cases that one lumped node can represent; the examples are recomputed with full precision where the book rounds. */

const INCROPERA: Pick<PublishedValue, 'source' | 'standing'> = {
	source: 'Incropera, DeWitt, Bergman, Lavine, Fundamentals of Heat and Mass Transfer, 6th ed.',
	standing: 'read in the source'
};
const CENGEL = { ...INCROPERA, source: 'Cengel, Heat and Mass Transfer' };

describe('a thermocouple junction', () => {
	const junction = sphere(0.70588e-3, 8500, 400);
	const film = { conductanceWPerK: 400 * junction.areaM2, tempC: 200 };
	const radiates = [{ exchangeAreaM2: 0.9 * junction.areaM2, tempC: 400 }];
	const lit: Body = { ...junction, films: [film], radiates };
	const settled = () => bodyAt(lit, 25, [60])[0]!;

	checkAgainst(
		{
			...INCROPERA,
			name: 'L1 Biot number of the junction',
			place: 'ex. 5.1',
			expected: 0.002353,
			unit: '',
			tolerance: { absolute: 5e-7 },
			because: 'recomputed to four digits, over a sixth of the diameter'
		},
		() => biot(400, 0.70588e-3 / 6, 20)
	);
	checkAgainst(
		{
			...INCROPERA,
			name: 'L1 time to 199 °C in gas at 200 °C',
			place: 'ex. 5.1',
			expected: 5.1648,
			unit: 's',
			tolerance: { absolute: 5e-4 },
			because: 'the logarithm of 175, worked to four decimals; the diameter has five digits'
		},
		() => timeTo({ ...junction, films: [film] }, 25, 199, 8)
	);
	checkAgainst(
		{
			...INCROPERA,
			name: 'L2 where it settles when the duct walls are at 400 °C',
			place: 'ex. 5.2',
			expected: 218.73,
			unit: '°C',
			tolerance: { absolute: 0.02 },
			because: 'recomputed; 218.71 °C with 273 K for 0 °C, as the book counts'
		},
		settled
	);
	checkAgainst(
		{
			...INCROPERA,
			name: 'L2 time until it is within 1 K of that',
			place: 'ex. 5.2',
			expected: 4.993,
			unit: 's',
			tolerance: { absolute: 0.01 },
			because: 'recomputed; the companion prints 4.98 from 217.70 °C, which is not the root'
		},
		() => timeTo(lit, 25, settled() - 1, 8)
	);
});

describe('a coated panel that is cured and cooled', () => {
	/** Half of the panel: 1.5 mm behind each square metre. */
	const heatCapacityJPerK = 2770 * 875 * 1.5e-3;
	const inRoom = (film: number, tempC: number): Body => ({
		heatCapacityJPerK,
		films: [{ conductanceWPerK: film, tempC }],
		radiates: [{ exchangeAreaM2: 0.8, tempC }]
	});
	const oven = inRoom(40, 175);
	const toCure = () => timeTo(oven, 25, 150, 200);
	const cured = () => bodyAt(oven, 25, [toCure() + 300])[0]!;
	const cooling = () => timeTo(inRoom(10, 25), cured(), 37, 1000);
	const panel = { ...INCROPERA, place: 'ex. 5.3' };
	const seconds = { unit: 's', tolerance: { absolute: 0.5 }, because: 'the book prints whole seconds' };

	checkAgainst({ ...panel, ...seconds, name: 'L3 time to 150 °C in the oven', expected: 123.07 }, toCure);
	checkAgainst(
		{ ...panel, ...seconds, name: 'L3 end of curing, 300 s later', expected: 423.07 },
		() => toCure() + 300
	);
	checkAgainst(
		{
			...panel,
			name: 'L3 temperature at the end of curing',
			expected: 174.75,
			unit: '°C',
			tolerance: { absolute: 0.01 },
			because: 'recomputed to two decimals'
		},
		cured
	);
	checkAgainst(
		{ ...panel, ...seconds, name: 'L3 whole time, back at 37 °C in the room', expected: 986.3 },
		() => toCure() + 300 + cooling()
	);
	for (const [roomC, film] of [
		[175, 15],
		[25, 8.8]
	] as const) {
		checkAgainst(
			{
				...panel,
				name: `L3 radiation of the panel at 150 °C as a film, room at ${roomC} °C`,
				expected: film,
				unit: 'W/m²K',
				tolerance: { absolute: 0.05 },
				because: 'printed to one decimal'
			},
			() => radiativeConductance(0.8, 150, roomC)
		);
	}
});

describe('spheres in air', () => {
	const ball = sphere(0.01, 3000, 1000);
	const small = sphere(0.001, 8500, 320);
	const warming: Body = { ...small, films: [{ conductanceWPerK: 210 * small.areaM2, tempC: 100 }] };

	checkAgainst(
		{
			...INCROPERA,
			name: 'L4 time from 400 to 335 °C in air of 20 °C',
			place: 'ex. 5.5, first step',
			expected: 93.8,
			unit: 's',
			tolerance: { absolute: 0.1 },
			because: 'recomputed to one decimal; the companion prints 93.7'
		},
		() => timeTo({ ...ball, films: [{ conductanceWPerK: 10 * ball.areaM2, tempC: 20 }] }, 400, 335, 200)
	);
	checkAgainst(
		{
			...CENGEL,
			name: 'L6 time to 99 % of the way',
			place: 'ex. 4-1',
			expected: 9.94,
			unit: 's',
			tolerance: { absolute: 0.01 },
			because: 'recomputed to two decimals; the book rounds to 10 s'
		},
		() => timeTo(warming, 0, 99, 20)
	);
	checkAgainst(
		{
			...CENGEL,
			name: 'L6 rate of the small sphere',
			place: 'ex. 4-1',
			expected: 0.4632,
			unit: '1/s',
			tolerance: { absolute: 5e-5 },
			because: 'recomputed to four decimals'
		},
		// What is left after one second, to its logarithm.
		() => -Math.log(1 - bodyAt(warming, 0, [1])[0]! / 100)
	);
	checkAgainst(
		{
			name: 'L7 share of a bead’s way after three time constants',
			source: 'Lienhard, A Heat Transfer Textbook',
			place: 'thermocouple bead',
			standing: 'read in the source',
			expected: 95,
			unit: '%',
			tolerance: { absolute: 0.5 },
			because: 'printed as a whole per cent'
		},
		() => bodyAt(warming, 0, [3 / 0.463235])[0]!
	);
});

describe('radiation alone', () => {
	checkAgainst(
		{
			...INCROPERA,
			standing: 'worked from the published equation',
			name: 'L8 an aluminium plate in deep space after 300 s',
			place: 'section 5.3, general solution',
			expected: 348.969,
			unit: 'K',
			tolerance: { absolute: 1e-3 },
			because: 'the closed form (T0⁻³ + 3Kt)^(−1/3), worked to three decimals'
		},
		() => {
			const radiates = [{ exchangeAreaM2: 0.9, tempC: -273.15 }];
			return bodyAt({ heatCapacityJPerK: 2700 * 900 * 1e-3, radiates }, 600 - 273.15, [300])[0]! + 273.15;
		}
	);
});
