/** Narrow no-break space: thin, and never parts a figure from its unit at a line's end. */
export const THIN_SPACE = '\u202F';
export const MINUS = '\u2212';

/** Rounded, with a true minus sign and never "−0". */
export function formatNumber(value: number, decimals = 0): string {
	const rounded = Number(value.toFixed(decimals));
	const text = Math.abs(rounded).toFixed(decimals);
	return rounded < 0 ? `${MINUS}${text}` : text;
}

/** A figure in a box as a person would have typed it: all its digits, no grouping, no exponent, no dust behind. */
export function writeNumber(value: number): string {
	const plain = Number(value.toPrecision(12));
	const text = String(plain).includes('e') ? plain.toFixed(20).replace(/\.?0+$/, '') : String(plain);
	return text.replace('-', MINUS);
}

/** Money of the workshop's own: to the cent where it is not whole. */
export const formatMoney = (amount: number): string =>
	formatNumber(amount, Number.isInteger(Number(amount.toFixed(2))) ? 0 : 2);

export function formatWithUnit(value: number, unit: string, decimals = 0): string {
	return `${formatNumber(value, decimals)}${THIN_SPACE}${unit}`;
}

export const formatTemperature = (tempC: number, decimals = 0): string =>
	formatWithUnit(tempC, '°C', decimals);

export const formatKelvin = (differenceK: number, decimals = 1): string =>
	formatWithUnit(differenceK, 'K', decimals);

/** A change in kelvin: a gain says its plus. */
export function formatKelvinChange(differenceK: number, decimals = 1): string {
	const text = formatKelvin(differenceK, decimals);
	return Number(differenceK.toFixed(decimals)) > 0 ? `+${text}` : text;
}

export const formatAmpHours = (chargeAh: number): string =>
	formatWithUnit(chargeAh, 'Ah', Math.abs(chargeAh) < 9.95 ? 1 : 0);

/** A capacity as it was given or measured: to a tenth where it is not whole. */
export const formatCapacity = (capacityAh: number): string =>
	formatWithUnit(capacityAh, 'Ah', Number.isInteger(capacityAh) ? 0 : 1);

export const formatAmps = (currentA: number): string =>
	formatWithUnit(currentA, 'A', Number.isInteger(currentA) ? 0 : 1);

export const formatWatts = (powerW: number): string =>
	formatWithUnit(powerW, 'W', Math.abs(powerW) < 9.95 ? 1 : 0);

export const formatPercent = (share: number, decimals = 0): string =>
	formatWithUnit(share * 100, '%', decimals);

export const formatMillimetres = (lengthMm: number): string => formatWithUnit(lengthMm, 'mm');

export const formatSpeed = (speedKmh: number): string => formatWithUnit(speedKmh, 'km/h');

/** Kilograms up to a tonne, then tonnes with one decimal, as a tow bar is spoken of. */
export const formatMass = (massKg: number): string =>
	Math.abs(massKg) < 1000 ? formatWithUnit(massKg, 'kg') : formatWithUnit(massKg / 1000, 't', 1);
