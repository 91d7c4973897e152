/** A tolerance about a nominal value: how far over and under it is allowed, both positive. */
export interface Band {
  readonly plus: number
  readonly minus: number
}
