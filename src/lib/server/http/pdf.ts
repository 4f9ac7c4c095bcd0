/** A document to keep or to look at, under a name that says what it is; never kept by anything in between. */
export function answerPdf(content: Buffer, name: string): Response {
	return new Response(new Uint8Array(content), {
		headers: {
			'content-type': 'application/pdf',
			'content-length': String(content.length),
			'content-disposition': `inline; filename="${name}.pdf"`,
			'cache-control': 'private, no-store'
		}
	});
}
