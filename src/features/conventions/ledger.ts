import type { Chapter } from './types.ts';

/** Definitions about the proof and about what it does not prove. */
export const ledgerChapter: Chapter = {
  id: 'proof',
  title: 'Proof and record',
  entries: [
    {
      id: 'ledger',
      term: 'Ledger',
      short:
        'The independent proof that a list is complete and its weights right: two equal sums, one of them made without any diagram.',
      body: [
        'No list of diagrams is shown without its proof. For every expansion a sum that is computed without generating any diagram must equal the sum over the list. It comes from the theory in zero dimensions, where every propagator is 1 and every kind of vertex is replaced by its own symbol over the factorials of its fields:',
        { display: '\\int\\!\\frac{d\\phi}{\\sqrt{2\\pi}}\\;e^{-\\phi^2/2+\\sum_k c_k\\phi^k/k!+J\\phi}' },
        '“All” is compared with this series, “normalised” with its ratio to $J=0$, “connected” with its logarithm, “1PI” with its Legendre transform expanded at $\\phi=0$. Sums of weights and numbers of contractions must both agree, for each content of vertices; for “all” the contractions are the perfect matchings of the half-lines. What is dropped is taken out of the sum as well, by normal-ordered vertices, by a source that makes $\\langle\\phi\\rangle$ vanish, or by vertices whose expectation is the bare vertex. Where that sum would need too much work, the ledger says that the cut list rests on the balanced uncut list.',
        'A ledger that does not balance is a defect of the program; the expansion is then marked unusable. A ledger proves counting, not physics.',
      ],
      sources: [
        'P. Cvitanović, B. Lautrup, R. B. Pearson, Phys. Rev. D 18 (1978) 1939.',
        'M. Borinsky, Ann. Phys. 385 (2017) 95.',
      ],
    },
    {
      id: 'working',
      term: 'Working',
      short:
        'The account of one symmetry factor by two routes: contractions counted step by step, and the automorphism group.',
      body: [
        'Each diagram carries the account of its factor by two routes: the contractions counted step by step, and the order of the automorphism group with its generators in words and in cycles. Both are made apart from the search that listed the diagram, which is a third route to the same number. The whole coefficient is split into the normalisation of the coupling, $1/S$, and signs with powers of $i$, never one number.',
      ],
      sources: [
        'H. Kleinert, A. Pelster, B. Kastening, M. Bachmann, Phys. Rev. E 62 (2000) 1537, for an independent route to the weights.',
      ],
    },
    {
      id: 'enumeration',
      term: 'How the list is made',
      short:
        'Row by row with canonical rows, so that every diagram arises exactly once and none is compared with another.',
      body: [
        'Diagrams are generated row by row in canonical form, so that each arises exactly once; the order of the automorphism group comes from the same search. No pairing of half-lines is enumerated and no diagram is compared with another.',
      ],
      sources: [
        'R. C. Read, Ann. Discrete Math. 2 (1978) 107.',
        'I. A. Faradžev, in Problèmes combinatoires et théorie des graphes, Colloq. Internat. CNRS 260 (1978) 131.',
        'M. Meringer, J. Graph Theory 30 (1999) 137.',
      ],
    },
    {
      id: 'convention-record',
      term: 'Convention record',
      short: 'The defining equations attached to every model and result, not their names.',
      body: [
        'Every model and result carries the equations that define its conventions: the weight, the metric, the sign of the Fourier transform, what a coupling multiplies, what $\\Gamma$, $W$, $\\Pi$ and $\\Sigma$ mean (for instance, inverse propagator $=p^2-m^2-\\Pi$), and the dimension. Results with unlike records are never merged silently.',
      ],
      sources: ['A definition of this program.'],
    },
    {
      id: 'label',
      term: 'Label of a diagram',
      short:
        'A canonical name: the same diagram has the same label in every expansion, whatever the order of terms or vertices.',
      body: [
        'The bare label of a diagram is canonical, with the names of fields and couplings forgotten; it is drawn from the SHA-256 digest of the least description of the diagram over all numberings. With a digest of the names of its fields and couplings it is the permanent id: the same diagram has the same id in every expansion. Two diagrams of one list may share a bare label when only names tell them apart.',
      ],
      sources: ['A definition of this program.'],
    },
    {
      id: 'cautions',
      term: 'Cautions',
      short:
        'Perturbation theory holds within its range: the series is asymptotic, and scheme, scale and normalisation matter.',
      body: [
        'Results of perturbation theory hold within its range: the series is asymptotic; scheme, scale and normalisation matter. Each exported result states its conventions, its order and what was dropped.',
      ],
      sources: ['Asymptotic series: C. M. Bender, T. T. Wu, Phys. Rev. 184 (1969) 1231.'],
    },
  ],
};
