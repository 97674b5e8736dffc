import { inspect } from 'node:util';

/** Shows that a study is closed, that its code holder's opening is on the record, or that a cue is being worked out. */
export class OpeningProof {
  // A private member, so that no other object passes for a proof.
  readonly #reason: string;

  constructor(reason: 'closed' | 'code holder' | 'cue') {
    this.#reason = reason;
  }

  get reason(): string {
    return this.#reason;
  }
}

/** A secret outside its store: it prints as [sealed], refuses to be serialised, and clones to an empty object. */
export class Sealed<T> {
  readonly #value: T;

  constructor(value: T) {
    this.#value = value;
  }

  open(_proof: OpeningProof): T {
    return this.#value;
  }

  toJSON(): never {
    throw new Error('a sealed value reached serialisation');
  }

  [inspect.custom](): string {
    return '[sealed]';
  }
}
