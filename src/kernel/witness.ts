/** Someone who sees every turn of a photon's path. Only pictures need one; tracing for numbers has none. */
export interface Witness {
  /** Light is about to fly on, from where and in which state `ray` and `now` say. */
  see(ray: Float64Array, now: Int32Array): void;
  /** The history has come to its end. @param fate its slot */
  close(fate: number, ray: Float64Array, now: Int32Array): void;
}
