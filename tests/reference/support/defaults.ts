/** Section 7 of the thermal model, written down a second time so that the engine's table is checked against it. */
export const MODEL_DEFAULTS = {
	vehicle: {
		massKg: 2900,
		dragAreaM2: 1.35,
		driveline: 0.85,
		accessoryPowerW: 2000,
		idleFuelPowerW: 12000,
		brakeEfficiency: 0.4,
		ratedFuelPowerW: 375000,
		coolantShare: 0.25
	},
	engine: {
		heatCapacity: 180e3,
		thermostatOpen: 82,
		thermostatFull: 95,
		radiatorStill: 300,
		radiatorPerSpeed: 90,
		radiatorMax: 2600,
		underStill: 8,
		underPerSpeed: 1.2,
		filmStill: 8,
		filmPerSqrtSpeed: 5,
		area: 1.3,
		emissivity: 0.9
	},
	exhaust: {
		heatCapacity: 7e3,
		gasIdle: 180,
		gasFull: 760,
		gasConductanceFull: 45,
		area: 0.25,
		emissivity: 0.8,
		filmStill: 8,
		filmPerSqrtSpeed: 5
	},
	bay: {
		heatCapacity: 9e3,
		fanFlow: 0.45,
		flowPerSpeed: 0.06,
		maxFlow: 2.4,
		share: 0.6,
		leakClosed: 20,
		leakOpen: 110
	},
	bonnet: {
		heatCapacity: 9e3,
		area: 1.6,
		absorptivity: 0.7,
		emissivity: 0.9,
		outStill: 8,
		outPerSpeed: 2.5,
		inside: 5
	},
	enclosure: { heatCapacity: 40e3, uaStill: 35, uaPerSpeed: 2, solarArea: 0.9, coolGain: 0, coolSet: 26 },
	position: {
		bayAirFraction: 0.85,
		enclosureFraction: 0,
		roadUplift: 0,
		airExposure: 0.15,
		exhaustView: 0.01,
		engineView: 0.05,
		bonnetView: 0.5,
		guardFraction: 0.5
	},
	shield: { area: 0.12, coverage: 0.9, emissivityOut: 0.1, emissivityIn: 0.1, gap: 10, heatCapacity: 200 },
	tray: { heatCapacity: 1500, guardConductance: 1, caseConductance: 1, filmArea: 0.25, filmShare: 0.2 },
	battery: {
		capacityAh: 100,
		caseArea: 0.277,
		topArea: 0.057,
		caseHeatCapacity: 2500,
		caseEmissivity: 0.92,
		filmStill: 5,
		filmPerSqrtSpeed: 4,
		caseCellConductance: 2.5,
		cellHeatCapacity: 11000,
		r25: 0.012,
		activationK: 1500,
		boardHeatCapacity: 400,
		boardR: 0.001,
		boardCellConductance: 0.5,
		boardCaseConductance: 0.2
	},
	bms: {
		sensor: 'cells',
		charge: { cut: 60, reset: 50 },
		discharge: { cut: 75, reset: 62 },
		cutDelayS: 0,
		autoReset: true
	},
	charger: { maxA: 40, taperSoc: 0.95 },
	climate: { tMax: 42, dailyRange: 15, sunPeak: 1000, pressurePa: 101325, skyDropK: 10 },
	start: { hour: 6, soc: 0.55 }
};

export const LEG_DEFAULTS = {
	engineOn: false,
	speedKmh: 0,
	surface: 'sealed' as const,
	gradePercent: 0,
	towMassKg: 0,
	towDragAreaM2: 0,
	bonnetOpen: false,
	loadA: 0
};

type Surface = 'sealed' | 'gravel' | 'corrugated' | 'rock' | 'sand';
export type ModelLeg = Omit<typeof LEG_DEFAULTS, 'surface'> & { minutes: number; surface: Surface };
type Group<K extends keyof typeof MODEL_DEFAULTS> = (typeof MODEL_DEFAULTS)[K];
export type ModelScenario = {
	[K in Exclude<keyof typeof MODEL_DEFAULTS, 'shield' | 'bms'>]: Group<K>;
} & {
	shield: Group<'shield'> | null;
	bms: Omit<Group<'bms'>, 'sensor'> & { sensor: 'cells' | 'board' | 'hotter' };
	legs: ModelLeg[];
};

/** A scenario as a table of cases writes it: only what differs from the defaults. */
export type CaseInput = {
	[K in Exclude<keyof typeof MODEL_DEFAULTS, 'shield' | 'bms'>]?: Partial<Group<K>>;
} & {
	shield?: Partial<Group<'shield'>>;
	bms?: Partial<ModelScenario['bms']>;
	legs: (Partial<ModelLeg> & { minutes: number })[];
};

/** Fills in the defaults of the page, without the engine. */
export function completeCase(input: CaseInput): ModelScenario {
	const groups = Object.fromEntries(
		Object.entries(MODEL_DEFAULTS).map(([name, defaults]) => [
			name,
			{ ...defaults, ...input[name as keyof typeof MODEL_DEFAULTS] }
		])
	);
	return {
		...groups,
		shield: input.shield ? { ...MODEL_DEFAULTS.shield, ...input.shield } : null,
		legs: input.legs.map((leg) => ({ ...LEG_DEFAULTS, ...leg }))
	} as ModelScenario;
}
