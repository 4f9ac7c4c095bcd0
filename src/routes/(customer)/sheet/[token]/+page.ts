/** Plain pages for any phone, and no program of ours on a page that a link alone opens. */
export const csr = false;
