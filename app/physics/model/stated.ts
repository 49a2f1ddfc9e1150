/** Low, middle and high of a quantity: P5, P50 and P95 where sampled, else the stated band. */
export interface Band {
  readonly low: number;
  readonly mid: number;
  readonly high: number;
}

export interface SourceRef {
  readonly text: string;
  /** False for values from memory: the screen then says "unverified". */
  readonly verified: boolean;
}

export interface Assumption {
  readonly field: string;
  readonly value: string;
  readonly source: SourceRef;
}
