import "server-only";
import { counterEdit } from "@/lib/review/counter-proposal";
import { conflictSentence, counterSentence } from "@/lib/review/counter-words";
import { RULES_VERSION } from "@/lib/rules/version";
import { checkRequestSchema, type CheckRequest } from "@/lib/schemas/check";
import type { CounterAnswer } from "@/lib/schemas/counter-proposal";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { currentPolicy } from "@/lib/services/policies/ensure";
import { acceptFiles } from "@/lib/services/revisions/accept";
import { rewriteFile } from "@/lib/services/revisions/files";
import { answerFile } from "@/lib/services/texts/answer";
import { storedSide } from "./run";

/** The smallest change of sent texts that clears what is over limit, without keeping anything. What is sent wins over what is stored. */
export async function counterPropose(context: Context, input: CheckRequest): Promise<CounterAnswer> {
  authorize(context, "check.run");
  const request = checkRequestSchema.parse(input);
  const files = acceptFiles(request.files, request.format);
  const stored = await storedSide(request);
  const { version, policy } = await currentPolicy();
  const edit = counterEdit({
    files,
    keyTable: stored.keyTable,
    assembly: stored.assembly,
    policy: { ...policy, ...request.policy },
    layer: request.layer,
  });
  return {
    sentence: counterSentence(edit),
    moves: edit.moves.map((move) => ({ ...move, also: [...move.also], because: [...move.because] })),
    cost: edit.cost,
    cleared: [...edit.cleared],
    conflicts: edit.conflicts.map((conflict) => ({
      checks: [...conflict.checks],
      sentence: conflictSentence(conflict, edit.leastShare),
    })),
    left: [...edit.left],
    leastShare: edit.leastShare,
    files: files.map((file, index) =>
      answerFile(rewriteFile(file, edit.files[index]?.text ?? file.text), request.files),
    ),
    versions: { rules: RULES_VERSION, policy: request.policy ? `${version}+sent` : String(version) },
  };
}
