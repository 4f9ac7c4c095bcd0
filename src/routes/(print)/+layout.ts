/** Paper needs no script. */
export const csr = false;
