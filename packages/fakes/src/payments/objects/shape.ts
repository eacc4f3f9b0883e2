/**
 * What a stand-in shows of a vendor's object: any part of it, but nothing that it has not. The
 * compiler holds each answer to the vendor's own types by it.
 */
export type Shown<T> = T extends readonly (infer Item)[]
  ? Shown<Item>[]
  : T extends object
    ? { [Key in keyof T]?: Shown<T[Key]> }
    : T
