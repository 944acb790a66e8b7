/** T with everything in it readonly, however deep: what is read from a file or kept in a note is never changed in place. */
export type Frozen<T> = T extends object ? { readonly [Key in keyof T]: Frozen<T[Key]> } : T;
