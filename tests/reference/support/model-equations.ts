import type { ModelLeg, ModelScenario } from './defaults';

/**
 * Sections 2 to 6 of the thermal model, line by line with the page's own signs, for the reference integrators.
 * Shares nothing with the engine.
 */

const SIGMA = 5.670374419e-8;
const CRR = { sealed: 0.012, gravel: 0.025, corrugated: 0.035, rock: 0.06, sand: 0.15 };
/** Clock hours 1…24. */
const PROFILE = [
	0.88, 0.92, 0.95, 0.98, 1.0, 0.98, 0.91, 0.74, 0.55, 0.38, 0.23, 0.13, 0.05, 0.0, 0.0, 0.06, 0.14, 0.24,
	0.39, 0.5, 0.59, 0.68, 0.75, 0.82
];

const kelvin = (tempC: number) => tempC + 273.15;
const rad = (g: number, a: number, b: number) => SIGMA * g * (kelvin(a) ** 4 - kelvin(b) ** 4);
const clamp = (value: number) => Math.max(0, Math.min(1, value));

export function modelAmbientC(hour: number, { tMax, dailyRange }: ModelScenario['climate']): number {
	const h = ((hour % 24) + 24) % 24;
	const k = Math.floor(h);
	const low = k === 0 ? PROFILE[23]! : PROFILE[k - 1]!;
	return tMax - dailyRange * (low + (h - k) * (PROFILE[k]! - low));
}

export function modelSunWPerM2(hour: number, { sunPeak }: ModelScenario['climate']): number {
	const h = ((hour % 24) + 24) % 24;
	return sunPeak * Math.max(0, Math.sin((Math.PI * (h - 6)) / 12)) ** 1.2;
}

/** What the latches and an empty battery decide; constant between restarts of the integration. */
export interface ModelSwitches {
	chargeOpen: boolean;
	dischargeOpen: boolean;
	empty: boolean;
}

export function modelCurrentA(s: ModelScenario, leg: ModelLeg, soc: number, switches: ModelSwitches): number {
	const { maxA, taperSoc } = s.charger;
	const spare = leg.engineOn ? maxA - leg.loadA : -leg.loadA;
	if (spare >= 0) {
		return switches.chargeOpen ? 0 : Math.min(spare, maxA * clamp((1 - soc) / (1 - taperSoc)));
	}
	return switches.dischargeOpen || switches.empty ? 0 : spare;
}

/** Order of the state: engine, exhaust, bay, bonnet, enclosure, shield, tray, case, cells, board, soc. */
export const MODEL_STATE = [
	'engine',
	'exhaust',
	'bay',
	'bonnet',
	'enclosure',
	'shield',
	'tray',
	'case',
	'cells',
	'board',
	'soc'
] as const;

/** The derivative of the state at a clock hour, per second. */
export function modelDerivative(
	s: ModelScenario,
	leg: ModelLeg,
	switches: ModelSwitches,
	hour: number,
	y: readonly number[]
): number[] {
	const [Teng, Tx, Tbay, Tbon, Tenc, Ts, Tt, Tc, Tk, Tm, soc] = y as unknown as Eleven;
	const { vehicle: ve, engine: en, exhaust: ex, bay: ba, bonnet: bo, enclosure: ec } = s;
	const { position: po, tray: tr, battery: bt, climate: cl } = s;
	const on = leg.engineOn;
	const v = leg.speedKmh / 3.6;
	const Tamb = modelAmbientC(hour, cl);
	const I = modelSunWPerM2(hour, cl);
	const rho = cl.pressurePa / (287.05 * kelvin(Tamb));

	// Section 3
	const mass = ve.massKg + leg.towMassKg;
	const F =
		mass * 9.80665 * (CRR[leg.surface] + leg.gradePercent / 100) +
		0.5 * rho * (ve.dragAreaM2 + leg.towDragAreaM2) * v * v;
	const Pbrake = Math.max(F * v, 0) / ve.driveline + ve.accessoryPowerW;
	const Pfuel = on ? Math.min(ve.idleFuelPowerW + Pbrake / ve.brakeEfficiency, ve.ratedFuelPowerW) : 0;
	const load = Pfuel / ve.ratedFuelPowerW;
	const flow = on ? Math.min(ba.fanFlow + ba.flowPerSpeed * v, ba.maxFlow) : 0;
	const Gair = rho * 1006 * flow;
	const o = clamp((Teng - en.thermostatOpen) / (en.thermostatFull - en.thermostatOpen));
	const Qrad =
		flow > 0 ? Math.min(en.radiatorStill + en.radiatorPerSpeed * v, en.radiatorMax) * o * (Teng - Tamb) : 0;
	const Tin = flow > 0 ? Tamb + Qrad / Gair : Tamb;
	const Tgas = ex.gasIdle + (ex.gasFull - ex.gasIdle) * Math.sqrt(load);
	const Ggas = on ? ex.gasConductanceFull * load ** 0.8 : 0;
	const Heng = (en.filmStill + en.filmPerSqrtSpeed * Math.sqrt(v)) * en.area;
	const Hx = (ex.filmStill + ex.filmPerSqrtSpeed * Math.sqrt(v)) * ex.area;
	const Gund = en.underStill + en.underPerSpeed * v;

	// Section 4
	const Tloc =
		Tamb +
		po.bayAirFraction * (Tbay - Tamb) +
		po.enclosureFraction * (Tenc - Tamb) +
		(po.roadUplift * I) / 1000;
	const hc = bt.filmStill + bt.filmPerSqrtSpeed * Math.sqrt(po.airExposure * v);
	const Tguard = Tamb + po.guardFraction * (Tbay - Tamb);
	const cov = s.shield?.coverage ?? 0;
	const As = s.shield?.area ?? 0;
	const Abare = Math.max(bt.caseArea - As, 0);
	const Gleak = leg.bonnetOpen ? ba.leakOpen : ba.leakClosed;

	// Section 5
	const eOut = s.shield?.emissivityOut ?? 0;
	const Qxc = rad(ex.emissivity * bt.caseEmissivity * po.exhaustView * (1 - cov), Tx, Tc);
	const Qxs = rad(ex.emissivity * eOut * po.exhaustView * cov, Tx, Ts);
	const Qec = rad(en.emissivity * bt.caseEmissivity * po.engineView * (1 - cov), Teng, Tc);
	const Qes = rad(en.emissivity * eOut * po.engineView * cov, Teng, Ts);
	const Qhc = leg.bonnetOpen
		? 0
		: rad(bo.emissivity * bt.caseEmissivity * bt.topArea * po.bonnetView, Tbon, Tc);
	const Qsc = s.shield
		? As * s.shield.gap * (Ts - Tc) +
			rad(As / (1 / s.shield.emissivityIn + 1 / bt.caseEmissivity - 1), Ts, Tc)
		: 0;
	const Qxb = rad(ex.emissivity * Math.max(ex.area - po.exhaustView, 0), Tx, Tbay);
	const R = bt.r25 * Math.exp(bt.activationK * (1 / kelvin(Tk) - 1 / 298.15));
	const i = modelCurrentA(s, leg, soc, switches);
	const cool = on ? ec.coolGain * Math.max(Tenc - ec.coolSet, 0) : 0;

	const engine = ve.coolantShare * Pfuel - Qrad - Heng * (Teng - Tbay) - Gund * (Teng - Tamb) - Qec - Qes;
	const exhaust = Ggas * (Tgas - Tx) - Hx * (Tx - Tbay) - Qxb - Qxc - Qxs;
	const bay =
		ba.share * Gair * (Tin - Tbay) +
		Gleak * (Tamb - Tbay) +
		Heng * (Teng - Tbay) +
		Hx * (Tx - Tbay) +
		Qxb +
		bo.inside * bo.area * (Tbon - Tbay);
	const bonnet =
		bo.absorptivity * I * bo.area -
		(bo.outStill + bo.outPerSpeed * v) * bo.area * (Tbon - Tamb) -
		rad(bo.emissivity * bo.area, Tbon, Tamb - cl.skyDropK) -
		bo.inside * bo.area * (Tbon - Tbay) -
		Qhc;
	const enclosure = (ec.uaStill + ec.uaPerSpeed * v) * (Tamb - Tenc) + ec.solarArea * I - cool;
	const shield = s.shield ? Qxs + Qes + hc * As * (Tloc - Ts) + rad(eOut * As, Tloc, Ts) - Qsc : 0;
	const tray =
		tr.guardConductance * (Tguard - Tt) +
		tr.filmShare * hc * tr.filmArea * (Tloc - Tt) -
		tr.caseConductance * (Tt - Tc);
	const caseHeat =
		hc * Abare * (Tloc - Tc) +
		rad(bt.caseEmissivity * Abare, Tloc, Tc) +
		Qxc +
		Qec +
		Qhc +
		Qsc +
		tr.caseConductance * (Tt - Tc) -
		bt.caseCellConductance * (Tc - Tk) +
		bt.boardCaseConductance * (Tm - Tc);
	const cells = bt.caseCellConductance * (Tc - Tk) + bt.boardCellConductance * (Tm - Tk) + i * i * R;
	const board = i * i * bt.boardR - bt.boardCellConductance * (Tm - Tk) - bt.boardCaseConductance * (Tm - Tc);

	return [
		engine / en.heatCapacity,
		exhaust / ex.heatCapacity,
		bay / ba.heatCapacity,
		bonnet / bo.heatCapacity,
		enclosure / ec.heatCapacity,
		s.shield ? shield / s.shield.heatCapacity : 0,
		tray / tr.heatCapacity,
		caseHeat / bt.caseHeatCapacity,
		cells / bt.cellHeatCapacity,
		board / bt.boardHeatCapacity,
		i / (3600 * bt.capacityAh)
	];
}

type Eleven = readonly [
	number,
	number,
	number,
	number,
	number,
	number,
	number,
	number,
	number,
	number,
	number
];
