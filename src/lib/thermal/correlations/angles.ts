/** Trigonometry in degrees, as astronomers write it. */
const DEG_PER_RAD = 180 / Math.PI;

export const sinDeg = (angleDeg: number): number => Math.sin(angleDeg / DEG_PER_RAD);
export const cosDeg = (angleDeg: number): number => Math.cos(angleDeg / DEG_PER_RAD);
export const tanDeg = (angleDeg: number): number => Math.tan(angleDeg / DEG_PER_RAD);
export const asinDeg = (sine: number): number => Math.asin(sine) * DEG_PER_RAD;
export const acosDeg = (cosine: number): number => Math.acos(cosine) * DEG_PER_RAD;
export const atan2Deg = (y: number, x: number): number => Math.atan2(y, x) * DEG_PER_RAD;

/** The same direction within 0…360. */
export const turnDeg = (angleDeg: number): number => angleDeg - 360 * Math.floor(angleDeg / 360);
/** The same direction within −180…180. */
export const halfTurnDeg = (angleDeg: number): number => turnDeg(angleDeg + 180) - 180;
