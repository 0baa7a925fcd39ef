import type { Chapter } from './types.ts';

/** Definitions about models and the rules that follow from them. */
export const modelChapter: Chapter = {
  id: 'models',
  title: 'Models and rules',
  entries: [
    {
      id: 'model',
      term: 'Model',
      short:
        'A Lagrangian density together with its conventions: signature, dimension, kinds of fields, roles of parameters.',
      body: [
        'A model is a Lagrangian density of scalar fields with its conventions. A field is real or complex. Fields are what carries a kinetic term; every other symbol is a parameter, real unless declared complex. Both readings can be overruled in the tables of the editor.',
        'Diagonal quadratic terms define propagators. Every other monomial is an interaction vertex; a linear term is a vertex with one line. A quadratic monomial is a vertex with two lines when a parameter in it has a loop order of 1 or more (a counterterm) or is marked as a vertex, and when it mixes two fields; mass mixing of two real fields can be rotated away instead where the angle is exact. Constants are dropped with a note.',
      ],
      sources: ['Common practice.'],
    },
    {
      id: 'signature',
      term: 'Signature and weight',
      short: 'Minkowski (+,−,−,−) or (−,+,+,+) with weight exp(iS), or Euclidean with weight exp(−S).',
      body: [
        'The three choices fix the weight of the path integral, the metric and the form of the kinetic term:',
        { display: '(+,-,-,-):\\quad e^{iS},\\qquad \\mathcal{L}=\\tfrac12(\\partial\\phi)^2-\\tfrac12 m^2\\phi^2-V' },
        { display: '(-,+,+,+):\\quad e^{iS},\\qquad \\mathcal{L}=-\\tfrac12(\\partial\\phi)^2-\\tfrac12 m^2\\phi^2-V' },
        {
          display:
            '\\text{Euclidean:}\\quad e^{-S},\\qquad \\mathcal{L}_E=\\tfrac12(\\partial\\phi)^2+\\tfrac12 m^2\\phi^2+V',
        },
        'A Euclidean model is typed as $\\mathcal{L}_E$, with the potential positive. A kinetic term whose sign does not fit the chosen signature is an error that says which signature it would fit.',
      ],
      sources: ['Common practice.'],
    },
    {
      id: 'propagator',
      term: 'Propagator',
      short: 'The inverse of the kinetic operator of the quadratic part, with the i of the chosen signature.',
      body: [
        'The propagator inverts the kinetic operator of the quadratic part. In the order of the signatures above:',
        { display: '\\frac{i}{p^2-m^2+i0},\\qquad \\frac{-i}{p^2+m^2-i0},\\qquad \\frac{1}{p^2+m^2}' },
        'A line of a complex field carries an arrow: it runs from its $\\phi^*$ end to its $\\phi$ end.',
      ],
      sources: [
        'Common practice.',
        'M. E. Peskin, D. V. Schroeder, An Introduction to Quantum Field Theory (1995), chapter 4, for (+,−,−,−).',
        'M. Srednicki, Quantum Field Theory (2007), chapters 8 to 10, for (−,+,+,+).',
      ],
    },
    {
      id: 'vertex-factor',
      term: 'Vertex factor',
      short:
        'i times the functional derivative of the interaction; every factorial of the monomial lives here, never in the weight.',
      body: [
        'The vertex factor is $i$ times the functional derivative of the interaction Lagrangian (Euclidean: minus the derivative of $V$). All combinatorial factors of the monomial live in it:',
        {
          display:
            '-\\frac{\\lambda}{4!}\\phi^4\\;\\to\\;-i\\lambda,\\qquad -\\frac{\\lambda}{4}\\phi^4\\;\\to\\;-6i\\lambda',
        },
        'All momenta at a vertex are incoming. A derivative $\\partial_\\mu$ becomes $-ip_\\mu$ in (+,−,−,−) and $+ip_\\mu$ in (−,+,+,+) and in Euclidean space, summed over the assignments of identical fields; the editor lists each assignment.',
        'Before a result is called complete, the process that computed it has a general computer algebra system differentiate the terms of each kind again and compares the numbers exactly. This check reaches up to 60 kinds of a model, with rational numbers, up to 12 fields and up to 20 terms; kinds with derivatives are outside it.',
      ],
      sources: [
        'Common practice.',
        'M. E. Peskin, D. V. Schroeder, An Introduction to Quantum Field Theory (1995), §4.6 and §9.2.',
      ],
    },
    {
      id: 'kind',
      term: 'Kind of vertex',
      short: 'A coupling monomial with a multiset of fields: all terms with the same two make one vertex factor.',
      body: [
        'A kind of vertex is a monomial of parameters with a multiset of fields. All terms of the Lagrangian with the same two are summed into one vertex factor, whatever their derivatives. A sum in a coefficient splits into kinds: $(g+\\lambda v)\\,h^3$ has two.',
      ],
      sources: ['A definition of this program.'],
    },
    {
      id: 'coupling-weight',
      term: 'Weight of a parameter',
      short:
        'How much one power of a parameter counts in the order: the power with which it stands, unless set otherwise.',
      body: [
        'Every parameter that stands in a vertex is a coupling. Its contribution to the order is the power with which it stands; powers may be negative or fractional ($1/f^2$ counts $-2$). In the table of parameters you may set another weight, weight 0 for a constant, or a loop order $\\ell$ for a counterterm. Where a coupling also stands in a propagator (as $\\lambda v^2/2$ in a shifted mass) it does not count there.',
      ],
      sources: ['A definition of this program.'],
    },
    {
      id: 'dimension',
      term: 'Mass dimension',
      short: 'A scalar field has dimension (d − 2)/2; the dimension of a coupling decides its power counting.',
      body: [
        'In $d$ dimensions a scalar field has mass dimension $(d-2)/2$ and the Lagrangian density has dimension $d$. A coupling of positive dimension is super-renormalisable, of dimension zero renormalisable, of negative dimension non-renormalisable. For $d=4-2\\varepsilon$ the verdict is taken at $\\varepsilon\\to0$.',
      ],
      sources: ['Common practice.', 'S. Weinberg, Phys. Rev. 118 (1960) 838, for the power counting of graphs.'],
    },
  ],
};
