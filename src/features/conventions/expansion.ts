import type { Chapter } from './types.ts';

/** Definitions about what an expansion holds. */
export const expansionChapter: Chapter = {
  id: 'expansions',
  title: 'Expansions',
  entries: [
    {
      id: 'contraction',
      term: 'Contraction',
      short: 'One way to pair all half-lines of vertices and external points: a real field with itself, φ with φ*.',
      body: [
        'Expanding the generating functional to an order gives vertices with half-lines, and external points with one half-line each. A contraction pairs all half-lines: a real field with itself, a complex $\\phi$ with $\\phi^*$.',
        {
          display:
            'Z[J]=\\exp\\Big(i\\!\\int\\!\\mathcal{L}_{\\rm int}\\big(\\tfrac{1}{i}\\tfrac{\\delta}{\\delta J}\\big)\\Big)\\exp\\Big(-\\tfrac12\\!\\int\\!\\!\\int J\\,\\Delta\\,J\\Big)',
        },
        'In Euclidean space: $Z[J]=\\exp(-\\int V(\\delta/\\delta J))\\,\\exp(\\tfrac12\\int\\!\\int J\\Delta J)$.',
      ],
      sources: ['Common practice.', 'G. C. Wick, Phys. Rev. 80 (1950) 268.'],
    },
    {
      id: 'diagram',
      term: 'Diagram',
      short:
        'A class of contractions under exchange of equal vertices and of identical fields at one vertex; legs stay fixed.',
      body: [
        'A diagram is a class of contractions under (a) exchange of vertices of one kind and (b) exchange of identical fields at one vertex. External points are labelled and stay fixed. The number of contractions in the class is shown as “contractions”.',
      ],
      sources: ['Common practice.'],
    },
    {
      id: 'symmetry-factor',
      term: 'Symmetry factor S and weight 1/S',
      short:
        'S is the order of the automorphism group with external points fixed; the weight of a diagram is 1/S exactly.',
      body: [
        'The weight of a diagram is its number of contractions divided by the exchanges that were counted apart:',
        {
          display:
            '\\frac{1}{S}=\\frac{\\text{contractions}}{\\prod_{\\rm kinds} n_{\\rm kind}!\\;\\prod_{\\rm vertices}\\prod_{\\rm fields}k_{\\rm field}!}',
        },
        'It is always one over an integer, the order of the automorphism group: automorphisms permute vertices and lines and fix external points, kinds, fields and directions. Each self-contraction of a real field contributes 2, $l$ of them at one vertex $l!$, and $m$ equal parallel lines $m!$. For disconnected diagrams the exchange of equal components is included. The weight never contains the coefficient of the coupling, its sign, or powers of $i$.',
      ],
      sources: [
        'H. Kleinert, A. Pelster, B. Kastening, M. Bachmann, Phys. Rev. E 62 (2000) 1537.',
        'Symmetry factors of complex fields: P. V. Dong, L. T. Hue, H. T. Hung, H. N. Long, N. H. Thao, arXiv:0907.0859.',
      ],
    },
    {
      id: 'loops',
      term: 'Loops',
      short: 'L = I − V + C: internal lines less vertices plus components that have a vertex.',
      body: [
        'The number of loops is $L=I-V+C$ with $I$ internal lines, $V$ vertices and $C$ components that have a vertex. Lines that end on an external point do not count.',
      ],
      sources: ['Common practice.'],
    },
    {
      id: 'order',
      term: 'Order',
      short: 'Exact powers of the couplings, a total power, or a number of loops; optionally with every lower order.',
      body: [
        'The order of a diagram is the sum over its vertices. You may fix the exact power of each coupling (those not named are 0), the total of all weights, or the number of loops $L+\\sum\\ell$ with the loop orders of counterterms included. “All lower orders too” takes every order up to the one given, for powers one by one.',
        'That the answer is finite is checked before anything runs. An exact or total power needs every usable kind to use up some of it. A number of loops needs $k-2+2\\ell>0$ for every kind with $k$ lines; a mass insertion or a tadpole term has no bounded loop order, so its power has to be bounded instead.',
      ],
      sources: ['A definition of this program.'],
    },
    {
      id: 'keep',
      term: 'What to keep',
      short: 'All (Z), normalised (Z[J]/Z[0]), connected (W), or one-particle irreducible and amputated (Γ).',
      body: [
        '“All” is $Z[J]$. “Normalised” is $Z[J]/Z[0]$: every component has an external point. “Connected” is $W$. “1PI” is connected, amputated, and still connected when any one internal line is cut; a bare propagator is not 1PI, one bare vertex is.',
        'With no legs and order 0, “all” and “normalised” hold one empty diagram of weight 1, and “connected” and “1PI” hold none.',
      ],
      sources: ['Common practice.'],
    },
    {
      id: 'self-contraction',
      term: 'Dropping self-contractions',
      short: 'Removes diagrams with a line whose two ends are on one vertex (normal-ordered vertices).',
      body: [
        'A self-contraction is a line with both ends on one vertex. Dropping them amounts to normal-ordered vertices.',
      ],
      sources: ['Common practice.'],
    },
    {
      id: 'tadpole',
      term: 'Dropping tadpoles',
      short: 'Removes diagrams with an internal line whose cut leaves a piece without external legs.',
      body: [
        'A tadpole is an internal line whose cut leaves a piece without external legs, a vertex with one line included. Among 1PI diagrams there are none. In a component without legs every such line, that is, every bridge, counts.',
      ],
      sources: ['A definition of this program, within common usage.'],
    },
    {
      id: 'scaleless',
      term: 'Dropping scaleless pieces',
      short:
        'Removes diagrams with a loop that hangs on the rest at one vertex or line: zero for massless fields in dimensional regularisation.',
      body: [
        'A scaleless piece has a loop and no external legs and hangs on the rest at a single vertex or line, a self-contraction included. For massless fields in dimensional regularisation it vanishes. In a component without legs this means any bridge, self-contraction or cut vertex.',
      ],
      sources: ['Common practice: scaleless integrals vanish in dimensional regularisation.'],
    },
    {
      id: 'shape',
      term: 'Shape and channels',
      short:
        'Diagrams equal up to exchange of external legs of one field; the number of its members is its channel count.',
      body: [
        'Diagrams that are equal up to exchange of external legs of one field are one shape. The number of its labelled members is its channel count: $s$, $t$ and $u$ make three for a bubble with four equal legs.',
      ],
      sources: ['A definition of this program, within common usage.'],
    },
    {
      id: 'states',
      term: 'Three states',
      short: 'Not computed; computed and none exist; cut off by a limit. They are never confused.',
      body: [
        'A list is not computed, or computed and none exist, or cut off by a limit. No part of the program turns a cut-off into zero, and a ledger is only shown for a whole list.',
      ],
      sources: ['A definition of this program.'],
    },
  ],
};
