import { describe, expect, it } from 'vitest';
import type { SheetContent } from '$lib/schemas/sheets';
import { writeSheetLetter } from './sheet-letter';

const HREF = 'https://shop.example/sheet/abc_-1';
const CONTENT = {
	workshop: { name: 'Wattle & Wire', address: '', phone: '00 0000 0101', email: 'bench@shop.example' },
	preparedBy: 'Noor <b>Pellegrin</b>',
	customerName: 'Ilse "Tarn"',
	vehicle: 'Farrow Drover, 2019',
	jobNumber: 412
} as unknown as SheetContent;

describe('the letter that brings the page', () => {
	it('says from whom, for which vehicle, and whom to ask, with the link on a line of its own', () => {
		const { subject, textBody } = writeSheetLetter(CONTENT, HREF);
		expect(subject).toBe('Your battery, on one page: job 412 at Wattle & Wire');
		expect(textBody.split('\n')).toContain(HREF);
		expect(textBody).toContain('Wattle & Wire worked out how a second battery in your Farrow Drover, 2019');
		expect(textBody).toContain('ask Wattle & Wire: 00 0000 0101 or bench@shop.example.');
	});

	it('lets nothing that people typed become markup', () => {
		const { htmlBody } = writeSheetLetter(CONTENT, HREF);
		expect(htmlBody).toContain('Hello Ilse &quot;Tarn&quot;,');
		expect(htmlBody).toContain('Noor &lt;b&gt;Pellegrin&lt;/b&gt; of Wattle &amp; Wire');
		expect(htmlBody.match(/<a /g)).toHaveLength(1);
	});

	it('asks by name alone where the shop has given no way to reach it', () => {
		const workshop = { ...CONTENT.workshop, phone: '', email: '' };
		expect(writeSheetLetter({ ...CONTENT, workshop }, HREF).textBody).toContain('ask Wattle & Wire.\n');
	});

	it('keeps its subject within what the outbox takes', () => {
		const workshop = { ...CONTENT.workshop, name: 'W'.repeat(300) };
		expect(writeSheetLetter({ ...CONTENT, workshop }, HREF).subject).toHaveLength(200);
	});
});
