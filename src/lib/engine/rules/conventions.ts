import type { Conventions, Signature } from '../lagrangian/model.ts';
import type { ConventionRecord } from './types.ts';

type Fixed = Pick<ConventionRecord, 'weight' | 'metric' | 'fourier' | 'generating' | 'selfEnergy' | 'vertexFunction'>;

/** What each signature means, in equations. */
const FIXED: Readonly<Record<Signature, Fixed>> = {
  '+---': {
    weight: 'e^{iS}, S = ∫d^dx L',
    metric: 'p² = p₀² − 𝐩²; propagator i/(p² − m² + i0)',
    fourier: 'φ(x) = ∫ d^dp/(2π)^d e^{−ip·x} φ(p), momenta incoming: ∂_μ → −i p_μ',
    generating: 'Z[J] = ∫Dφ e^{i∫(L + Jφ)} = e^{iW[J]}; Γ[φ] = W[J] − ∫Jφ',
    selfEnergy: 'full inverse propagator = −i(p² − m² − Π(p²)); −iΠ is the sum of 1PI two-point diagrams',
    vertexFunction: 'amputated 1PI n-point diagrams sum to iΓ⁽ⁿ⁾',
  },
  '-+++': {
    weight: 'e^{iS}, S = ∫d^dx L',
    metric: 'p² = −p₀² + 𝐩²; propagator −i/(p² + m² − i0)',
    fourier: 'φ(x) = ∫ d^dp/(2π)^d e^{ip·x} φ(p), momenta incoming: ∂_μ → +i p_μ',
    generating: 'Z[J] = ∫Dφ e^{i∫(L + Jφ)} = e^{iW[J]}; Γ[φ] = W[J] − ∫Jφ',
    selfEnergy: 'full inverse propagator = i(p² + m² + Π(p²)); −iΠ is the sum of 1PI two-point diagrams',
    vertexFunction: 'amputated 1PI n-point diagrams sum to iΓ⁽ⁿ⁾',
  },
  euclidean: {
    weight: 'e^{−S_E}, S_E = ∫d^dx L_E, L_E = ½(∂φ)² + V',
    metric: 'p² = p₁² + … + p_d²; propagator 1/(p² + m²)',
    fourier: 'φ(x) = ∫ d^dp/(2π)^d e^{ip·x} φ(p), momenta incoming: ∂_μ → +i p_μ',
    generating: 'Z[J] = ∫Dφ e^{−S_E + ∫Jφ} = e^{W[J]}; Γ[φ] = ∫Jφ − W[J]',
    selfEnergy: 'full inverse propagator = p² + m² + Π(p²); −Π is the sum of 1PI two-point diagrams',
    vertexFunction: 'amputated 1PI n-point diagrams sum to −Γ⁽ⁿ⁾',
  },
};

/** The record of defining equations that is attached to every model and result. */
export function conventionRecord({ signature, dimension }: Conventions): ConventionRecord {
  const sign = signature === 'euclidean' ? 'minus the derivative of L_E' : 'i times the derivative of L';
  return {
    signature,
    dimension,
    ...FIXED[signature],
    couplings: `A coupling multiplies its term as typed; a vertex factor is ${sign} with respect to its fields, so the factorials of the term live there and not in the weight 1/S. All momenta flow in; momentum conservation is not used in vertex factors.`,
    scheme: `Bare perturbation theory in d = ${dimension}: no subtraction, no power of a renormalisation scale inside a coupling.`,
  };
}
