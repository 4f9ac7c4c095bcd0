import { describe, expect, it } from 'vitest';
import { vehicleInputSchema } from '$lib/schemas/vehicles';
import { TYPICAL_BODIES, TYPICAL_TRAILERS } from './typical-vehicles';

describe('typical bodies and trailers', () => {
	const { massKg, dragAreaM2, towMassKg, towDragAreaM2 } = vehicleInputSchema.shape;

	it.each(TYPICAL_BODIES.map((body) => [body.label, body] as const))('%s can be saved', (_, body) => {
		expect(massKg.safeParse(body.massKg).success && dragAreaM2.safeParse(body.dragAreaM2).success).toBe(true);
	});

	it.each(TYPICAL_TRAILERS.map((trailer) => [trailer.label, trailer] as const))(
		'%s can be saved',
		(_, trailer) => {
			const fits = towMassKg.safeParse(trailer.massKg).success;
			expect(fits && towDragAreaM2.safeParse(trailer.dragAreaM2).success).toBe(true);
		}
	);

	it('are those that the hints of the boxes speak of', () => {
		const hints = [dragAreaM2, towDragAreaM2].map((field) => String(field.meta()?.hint));
		const drag = (id: string) =>
			[...TYPICAL_BODIES, ...TYPICAL_TRAILERS].find((each) => each.id === id)?.dragAreaM2;
		expect(hints[0]).toContain(`about ${drag('wagon')} for a wagon`);
		expect(hints[0]).toContain(
			`${drag('four-wheel-drive-rack')} for a tall four-wheel drive with a roof rack`
		);
		expect(hints[1]).toContain(`${drag('camper')} for a low camper trailer`);
		expect(hints[1]).toContain(`${drag('caravan')} for a full-height caravan`);
	});
});
