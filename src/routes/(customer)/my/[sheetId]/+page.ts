/** The same plain page as behind the link. */
export const csr = false;
