"use client";

import { useMutation } from "@tanstack/react-query";
import { useRouter } from "next/navigation";
import { needsBasis, parameterDefinition } from "@/lib/domain/parameters";
import type { Basis, ParameterValue } from "@/lib/domain/values";
import { onAxis } from "@/lib/review/axis-word";
import { apiCall } from "@/components/api";
import { Refusal } from "@/components/forms/refusal";
import { Button } from "@/components/ui/button";
import { LevelMark } from "@/components/ui/level-mark";

/** The currents of which nobody has said yet whether they are peak or rms. */
function withoutBasis(parameters: readonly ParameterValue[]): ParameterValue[] {
  return parameters.filter(
    ({ parameter, basis, unit }) => needsBasis(parameter) && basis === null && unit !== "%",
  );
}

export interface BasisQuestionsProps {
  readonly modelId: string;
  readonly parameters: readonly ParameterValue[];
  /** Whether the reader may say it. */
  readonly mayAnswer: boolean;
  /** After it was said; left out: the page is loaded again. */
  readonly onAnswered?: (() => void) | undefined;
}

/** Asked once for each key; the answer is kept in the key table. */
export function BasisQuestions({ modelId, parameters, mayAnswer, onAnswered }: BasisQuestionsProps) {
  const router = useRouter();
  const asked = withoutBasis(parameters);
  const answer = useMutation({
    mutationFn: ({ value, basis }: { value: ParameterValue; basis: Basis }) =>
      apiCall("POST", `/key-tables/${modelId}/basis`, {
        body: { key: value.source.key, parameter: value.parameter, basis },
      }),
    onSuccess: () => (onAnswered ? onAnswered() : router.refresh()),
  });
  if (asked.length === 0) return null;
  return (
    <div className="notice">
      <p className="notice-title">
        <LevelMark level="cannot" /> Peak or rms?
      </p>
      <p>
        A current is not used before somebody has said whether it is a peak or an rms value.{" "}
        {mayAnswer
          ? "Say it once; the key table remembers it for every machine of this model."
          : "An engineer says it once, and the key table remembers it."}
      </p>
      <ul>
        {asked.map((value) => (
          <Question
            key={`${value.axis ?? ""} ${value.parameter}`}
            value={value}
            busy={answer.isPending}
            onAnswer={mayAnswer ? (basis) => answer.mutate({ value, basis }) : null}
          />
        ))}
      </ul>
      <Refusal error={answer.error} />
    </div>
  );
}

interface QuestionProps {
  readonly value: ParameterValue;
  readonly busy: boolean;
  readonly onAnswer: ((basis: Basis) => void) | null;
}

function Question({ value, busy, onAnswer }: QuestionProps) {
  const { axis, parameter, source } = value;
  const what = onAxis(axis, parameterDefinition(parameter).label.toLowerCase());
  return (
    <li className="flex flex-wrap items-center gap-3 py-1">
      <span>
        {what}: <span className="code">{source.key}</span> = <span className="code">{source.raw}</span>, line{" "}
        {source.line}
      </span>
      {onAnswer && (
        <span className="acts">
          <Button busy={busy} onClick={() => onAnswer("rms")} aria-label={`${what} is rms`}>
            It is rms
          </Button>
          <Button busy={busy} onClick={() => onAnswer("peak")} aria-label={`${what} is peak`}>
            It is peak
          </Button>
        </span>
      )}
    </li>
  );
}
