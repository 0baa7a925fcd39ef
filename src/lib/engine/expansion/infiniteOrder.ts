import { InputError } from '../errors.ts';

/** A request whose order admits infinitely many diagrams; says which kind makes it so, as an index, for the caller to name. */
export class InfiniteOrder extends InputError {
  constructor(
    /** Index of the kind into theory.kinds. */
    readonly kind: number,
    private readonly reason: string,
  ) {
    super('infinite-order', `The order is infinite: the vertex of kind ${kind + 1} ${reason}`);
  }

  /** The refusal with the kind named as a model names it. */
  sentence(kindName: string): string {
    return `The order is infinite: the vertex ${kindName} ${this.reason}`;
  }
}
