/** A content as it is given out. */
export interface GivenContent {
	bytes: Buffer;
	media: string;
	name: string;
	sha256: string;
	/** To be saved, never shown in a page. */
	isDownload: boolean;
}

/** RFC 6266 and RFC 8187: plain letters for old programs, the whole name for the others. */
function disposition({ name, isDownload }: GivenContent): string {
	const plain = name.replace(/[^\w. -]/g, '_');
	const whole = encodeURIComponent(name).replace(
		/['()*]/g,
		(letter) => `%${letter.charCodeAt(0).toString(16)}`
	);
	return `${isDownload ? 'attachment' : 'inline'}; filename="${plain}"; filename*=UTF-8''${whole}`;
}

/**
 * A content for whoever may see it. The browser asks each time whether it still may: on a phone that two people share
 * nobody sees a picture of the other's out of the cache.
 */
export function contentResponse(request: Request, content: GivenContent): Response {
	const headers = {
		etag: `"${content.sha256}"`,
		'cache-control': 'private, no-cache',
		'x-content-type-options': 'nosniff',
		'content-security-policy': "default-src 'none'; sandbox"
	};
	if (request.headers.get('if-none-match') === headers.etag)
		return new Response(null, { status: 304, headers });
	return new Response(new Uint8Array(content.bytes), {
		headers: {
			...headers,
			'content-type': content.media,
			'content-length': String(content.bytes.byteLength),
			'content-disposition': disposition(content)
		}
	});
}
