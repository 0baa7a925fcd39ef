import { InputError } from '../errors.ts';
import { type CanonicalRequest, canonicalRequest, requestKey } from '../expansion/canonicalRequest.ts';
import { InfiniteOrder } from '../expansion/infiniteOrder.ts';
import { contents } from '../expansion/orders.ts';
import type { Content, CountingRequest, Drop, Keep } from '../graph/theory.ts';
import type { ModelSource } from '../lagrangian/input.ts';
import type { Model } from '../lagrangian/model.ts';
import { readModel } from '../lagrangian/read.ts';
import { conventionRecord } from '../rules/conventions.ts';
import { modelRules } from '../rules/rules.ts';
import { readLegs } from './legs.ts';
import { type OrderInput, readOrder } from './order.ts';
import { type NamedTheory, theoryOf } from './theory.ts';
import type { ConventionRecord, RulesDTO } from './types.ts';

/** A request as the contract writes it (the contract's ExpansionRequest is assignable to it). */
export interface ExpansionInput extends ModelSource {
  readonly legs: readonly string[];
  readonly order: OrderInput;
  readonly through: boolean;
  readonly keep: Keep;
  readonly drop: readonly Drop[];
  readonly with: readonly 'integral'[];
}

/** Names of a request laid over the canonical, name-free numbering that diagrams come in. */
export interface Names extends NamedTheory {
  /** Canonical names of the legs: "phi", "phi^*". */
  readonly legs: readonly string[];
}

/** A request validated as far as it can be before anything runs. Plain data. */
export interface Prepared {
  readonly model: Model;
  readonly canonical: CanonicalRequest;
  /** Text that is equal for requests that are the same up to renaming and reordering. */
  readonly canonicalKey: string;
  readonly contents: readonly Content[];
  readonly names: Names;
  readonly rules: RulesDTO;
  readonly conventions: ConventionRecord;
}

/** Vertex contents, with the kind of an infinite order named as the model names it. */
function boundedContents(request: CountingRequest, named: NamedTheory): Content[] {
  try {
    return contents(request);
  } catch (error) {
    if (!(error instanceof InfiniteOrder)) throw error;
    throw new InputError('infinite-order', error.sentence(named.kinds[error.kind]!.name));
  }
}

/** Reorders names from the model's numbering into the canonical one. */
function permuted(named: NamedTheory, { typeOrder, kindOrder, request }: CanonicalRequest): NamedTheory {
  return {
    theory: request.theory,
    halves: typeOrder.map((type) => named.halves[type]!),
    kinds: kindOrder.map((kind) => named.kinds[kind]!),
    couplings: named.couplings,
  };
}

/**
 * Reads a request: the model, its legs and order, whether the order is finite, and its canonical form.
 *
 * @throws InputError with the place in the Lagrangian where there is one (syntax, wrong-legs, unknown-name, infinite-order …);
 * LimitError over a stated bound.
 */
export function prepare(input: ExpansionInput): Prepared {
  if (input.with.length > 0)
    throw new InputError('unsupported', 'Integrals are not computed yet: leave "with" out or empty.');
  const model = readModel(input);
  const named = theoryOf(model);
  const { types, names: legs } = readLegs(named, model, input.legs);
  const request: CountingRequest = {
    theory: named.theory,
    legs: types,
    order: readOrder(named, input.order, input.through),
    keep: input.keep,
    drop: [...new Set(input.drop)].sort(),
  };
  boundedContents(request, named);
  const canonical = canonicalRequest(request);
  return {
    model,
    canonical,
    canonicalKey: requestKey(canonical.request),
    contents: contents(canonical.request),
    names: { ...permuted(named, canonical), legs },
    rules: modelRules(model),
    conventions: conventionRecord(model.conventions),
  };
}
