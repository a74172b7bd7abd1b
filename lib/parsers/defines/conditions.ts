import type { Span } from "@/lib/domain/span";

/** Entries nested deeper than this keep the outer conditions, so that a hostile text cannot make them grow. */
const MOST_CONDITIONS = 64;

/** Where an entry stands: the conditions it holds under, and whether it can ever hold. */
export interface Branch {
  /** Outermost first; empty: always. */
  readonly conditions: readonly string[];
  /** Excluded by a decided condition such as `#if 0`. */
  readonly never: boolean;
  /** The same number for entries of one branch; 0 outside of every undecided condition. */
  readonly id: number;
}

interface Frame {
  readonly opener: string;
  readonly outer: Branch;
  readonly span: Span;
  readonly guard: boolean;
  /** An earlier branch of this block may hold. */
  undecided: boolean;
  /** An earlier branch of this block always holds. */
  taken: boolean;
}

const ALWAYS: Branch = { conditions: [], never: false, id: 0 };

/** Follows `#if` ... `#endif` through a text. */
export class Conditions {
  branch: Branch = ALWAYS;
  private readonly frames: Frame[] = [];
  private count = 0;

  open(opener: string, verdict: boolean | null, span: Span, guard = false): void {
    const frame: Frame = { opener, outer: this.branch, span, guard, undecided: false, taken: false };
    this.frames.push(frame);
    this.enter(frame, opener, guard ? true : verdict);
  }

  /** `#else` and its kin; false where no block is open. */
  alternative(directive: string, verdict: boolean | null): boolean {
    const frame = this.frames[this.frames.length - 1];
    if (!frame) return false;
    this.enter(frame, `${directive} (of ${frame.opener})`, verdict);
    return true;
  }

  /** `#endif`; false where no block is open. */
  close(): boolean {
    const frame = this.frames.pop();
    if (frame) this.branch = frame.outer;
    return frame !== undefined;
  }

  /** Blocks that the text leaves open. */
  unclosed(): readonly { readonly opener: string; readonly span: Span }[] {
    return this.frames;
  }

  private enter(frame: Frame, label: string, verdict: boolean | null): void {
    const { outer } = frame;
    const never = outer.never || frame.taken || verdict === false;
    const certain = verdict === true && !frame.undecided && !frame.taken;
    this.branch = certain ? outer : { conditions: under(outer.conditions, label), never, id: ++this.count };
    if (verdict === true) frame.taken = true;
    if (verdict === null) frame.undecided = true;
  }
}

/** Conditions with one more inside. */
export function under(conditions: readonly string[], inner: string): readonly string[] {
  return conditions.length < MOST_CONDITIONS ? [...conditions, inner] : conditions;
}

/** `#if 1` always holds, `#if 0` never; null for whatever needs a preprocessor. */
export function decide(expression: string): boolean | null {
  const bare = expression.replace(/[()\s]/g, "");
  if (bare === "1" || bare === "true") return true;
  return bare === "0" || bare === "false" ? false : null;
}
