const LOOK_EVERY_MS = 700;

/** Looks and tells again and again, until what is looked at is at its end or nobody listens any more. */
export async function follow<Seen>(
	look: () => Promise<Seen>,
	isAtEnd: (seen: Seen) => boolean,
	tell: (seen: Seen) => void,
	isOver: () => boolean
): Promise<void> {
	for (;;) {
		const seen = await look();
		tell(seen);
		if (isAtEnd(seen) || isOver()) return;
		await new Promise((resolve) => setTimeout(resolve, LOOK_EVERY_MS));
	}
}
