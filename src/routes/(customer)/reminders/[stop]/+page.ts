/** A plain page for any phone: a link alone opens it. */
export const csr = false;
