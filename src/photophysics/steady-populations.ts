/** Where the molecules of a dye are under steady light. The three add up to 1. */
export interface Populations {
  readonly ground: number;
  /** First excited singlet, from which light is emitted. */
  readonly excited: number;
  readonly triplet: number;
}

/** How a dye comes back to its ground state. */
export interface DyeKinetics {
  readonly lifetimeNs: number;
  /** Share of excitations that end in the triplet, and how long it lasts; null: two levels only. */
  readonly triplet: { readonly yield: number; readonly lifetimeNs: number } | null;
}

/**
 * Molecules in the triplet per molecule in the excited singlet in the steady state: Φ_T τ_T/τ, from
 * 0 = (Φ_T/τ) n₁ − n_T/τ_T. 0 without a triplet.
 */
export function tripletRatio({ lifetimeNs, triplet }: DyeKinetics): number {
  return triplet === null ? 0 : (triplet.yield * triplet.lifetimeNs) / lifetimeNs;
}

/**
 * Steady state of the rate equations dn₁/dt = W n₀ − n₁/τ, dn_T/dt = (Φ_T/τ) n₁ − n_T/τ_T, n₀ + n₁ + n_T = 1:
 * n₁ = x n₀ with x = Wτ, n_T = β n₁, hence n₀ = 1/(1 + x(1 + β)). Absorption from excited states and stimulated emission are left out.
 * Source: rate equations of any text on dye lasers, as in Schäfer (ed.), Dye Lasers (from memory).
 * @param excitations Wτ: excitations of a ground-state molecule in one lifetime
 * @param ratio β of `tripletRatio`
 */
export function steadyPopulations(excitations: number, ratio: number): Populations {
  if (excitations === Number.POSITIVE_INFINITY)
    return { ground: 0, excited: 1 / (1 + ratio), triplet: ratio / (1 + ratio) };
  const ground = 1 / (1 + excitations * (1 + ratio));
  const excited = excitations * ground;
  return { ground, excited, triplet: ratio * excited };
}
