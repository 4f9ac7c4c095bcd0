/** What every paper says of its own standing. */
export const DEFERENCE =
	'This recommendation is an estimate from measurements, a data sheet and published figures. It is not a certificate and does not replace anybody’s judgement on site. The instructions and warranty terms of the battery maker and of the vehicle maker come first; so do local rules, among them wiring rules for recreational vehicles and vehicle modification codes; and the work is for people who are licensed for it where a licence is asked for. Where any of these say something else than this page, follow them.';
