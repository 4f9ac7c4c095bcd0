import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { onceKeyOf } from './forms';

const KEY = 'a-form-that-a-page-opened';
const ASK = { name: 'ask', schema: z.object({ question: z.string() }) };

const send = (button: string, boxes: Record<string, string>) => {
	const formData = new FormData();
	for (const [box, text] of Object.entries(boxes)) formData.set(box, text);
	return [{ url: new URL(`https://shop.example/sheet/1?/${button}`) }, formData] as const;
};
const plain = (button: string, boxes: Record<string, string>) => onceKeyOf(...send(button, boxes));
const asking = (button: string, boxes: Record<string, string>) => onceKeyOf(...send(button, boxes), ASK);

describe('the key of a form that is sent twice', () => {
	const said = { onceKey: KEY, question: 'How hot?' };

	it('is none where the page gave none: such a form may be sent again', () => {
		expect(plain('ask', { question: 'How hot?' })).toBeNull();
	});

	it('is the same for the same words, another for others, another button and another form', () => {
		expect(plain('ask', said)).toBe(plain('ask', { ...said }));
		expect(plain('ask', { ...said, question: 'How long?' })).not.toBe(plain('ask', said));
		expect(plain('send', said)).not.toBe(plain('ask', said));
		expect(plain('ask', { ...said, onceKey: 'another' })).not.toBe(plain('ask', said));
	});

	it('of a named deed is the same by each of its buttons, whatever stands in boxes of others', () => {
		expect(asking('send', { ...said, name: 'Ilse' })).toBe(asking('ask', said));
		expect(asking('ask', { ...said, question: 'How long?' })).not.toBe(asking('ask', said));
		expect(onceKeyOf(...send('ask', said), { ...ASK, name: 'acknowledge' })).not.toBe(asking('ask', said));
	});
});
