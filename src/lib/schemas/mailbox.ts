/** A letter that this installation sent, as the local mailbox lists it. */
export interface LetterRow {
	/** The part of the letter's message id before the @: it stands in the page's address. */
	messageId: string;
	recipient: string;
	subject: string;
	receivedAt: string;
}

/** One line of a letter: words, or a link on a line of its own. */
export type LetterLine = { kind: 'words'; text: string } | { kind: 'link'; href: string };

export interface LetterView extends LetterRow {
	sender: string;
	lines: LetterLine[];
}
