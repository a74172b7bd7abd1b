import { toleranceOdds, type OddsInput, type OddsReport } from "./tolerance-odds";

/** What the worker of the tolerance odds tells its page. */
export type OddsAnswer =
  | { readonly kind: "progress"; readonly share: number }
  | { readonly kind: "done"; readonly report: OddsReport };

/** The worker's whole work; the page ends the worker to stop it. */
export function runOdds(input: OddsInput, answer: (said: OddsAnswer) => void): void {
  const report = toleranceOdds(input, (share) => answer({ kind: "progress", share }));
  answer({ kind: "done", report });
}
