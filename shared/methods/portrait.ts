/** How one check of the answers' course came out. */
export type PortrayedCheck = {
  readonly name: string;
  readonly tail: string;
  readonly isFlagged: boolean;
  readonly words: string;
};

/** What a report shows of a registered result, in its method's words: text, and numbers to draw. */
export type Portrait = {
  /** The first leads. */
  readonly figures: readonly { readonly value: string; readonly label: string }[];
  /** Below the figures. */
  readonly note: string;
  /** Beside the finding, with the other conditions. */
  readonly conditions: readonly { readonly label: string; readonly value: string }[];
  readonly distribution: {
    readonly title: string;
    readonly lede: readonly string[];
    readonly observed: number;
    /** What is counted: "Right answers out of 48". */
    readonly quantity: string;
    /** The least count that is a finding. */
    readonly limit?: number;
    /** Counts at or beyond these lie as far from the middle as the observed one; their chances add up to p. */
    readonly beyond?: { readonly low: number; readonly high: number };
    /** Whose chance a bar shows: "Chance by guessing". */
    readonly chanceOf: string;
  };
  readonly listeners: {
    readonly lede: readonly string[];
    readonly columns: readonly { readonly header: string; readonly isFigure: boolean }[];
    readonly rows: readonly {
      readonly listener: string;
      readonly cells: readonly string[];
      /** Why this listener may be named, or null. */
      readonly named: string | null;
    }[];
    readonly chart: {
      readonly caption: string;
      readonly quantity: string;
      /** The value that comes of nothing, drawn as a line, and what it stands for: "guessing". Null where there is none. */
      readonly middle: { readonly value: number; readonly words: string } | null;
      readonly rows: readonly {
        readonly label: string;
        readonly value: number;
        readonly low: number;
        readonly high: number;
      }[];
    };
  };
  readonly checks: readonly PortrayedCheck[];
};
