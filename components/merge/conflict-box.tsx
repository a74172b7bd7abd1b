"use client";

import { useId } from "react";
import { parameterLabel } from "@/lib/domain/parameters";
import { onAxis } from "@/lib/review/axis-word";
import type { ChoiceEffect, ConflictOutlook } from "@/lib/review/merge-protocol";
import type { ConflictPlace, MergeChoice, MergeConflict, MergedValue } from "@/lib/review/merge-types";
import { CodeText } from "@/components/revision/code-text";
import { LevelMark } from "@/components/ui/level-mark";
import { NoValue, ParameterQuantity, Quantity } from "@/components/ui/quantity";
import { Head, NumberCell, Table } from "@/components/ui/table";
import { choiceWords } from "./choice-words";

export interface ConflictBoxProps {
  readonly outlook: ConflictOutlook;
  /** The text in force, in words: "baseline 7". */
  readonly todayLabel: string;
  readonly onChoose: (id: string, choice: MergeChoice) => void;
}

/** One conflict: what each text says, which to take, and what each choice does physically. */
export function ConflictBox({ outlook: { conflict, effects }, todayLabel, onChoose }: ConflictBoxProps) {
  const name = useId();
  return (
    <fieldset className="merge-conflict">
      <legend>{titleOf(conflict)}</legend>
      {conflict.options.map((choice) => (
        <div key={choice} className="merge-choice">
          <input
            type="radio"
            id={`${name}-${choice}`}
            name={name}
            checked={conflict.choice === choice}
            onChange={() => onChoose(conflict.id, choice)}
          />
          <label htmlFor={`${name}-${choice}`}>
            {choiceWords(choice, todayLabel)}
            <Said conflict={conflict} choice={choice} />
          </label>
        </div>
      ))}
      {effects.length > 0 ? (
        <EffectsOfChoices effects={effects} todayLabel={todayLabel} />
      ) : (
        <p className="quiet">No physical quantity differs between the choices.</p>
      )}
    </fieldset>
  );
}

function titleOf({ kind, path, places, lines }: MergeConflict): string {
  const names = places.map(({ axis, parameter, key }) =>
    parameter === null ? (key ?? "") : onAxis(axis, parameterLabel(parameter).toLowerCase()),
  );
  if (kind === "file") return names.length === 0 ? path : `${path}: ${names.join(", ")}`;
  if (names.length > 0) return names.join(", ");
  return `${path}, line ${lines.theirs?.line ?? lines.ours?.line ?? 1} on`;
}

/** What a text says there: the values, else the lines. */
function Said({ conflict, choice }: { readonly conflict: MergeConflict; readonly choice: MergeChoice }) {
  if (choice === "both")
    return (
      <pre className="code merge-lines">
        <CodeText text={`${conflict.lines.ours?.text ?? ""}${conflict.lines.theirs?.text ?? ""}`} />
      </pre>
    );
  const lines = conflict.lines[choice];
  return (
    <>
      {conflict.places.map((place) => (
        <span key={`${place.axis}|${place.parameter}|${place.key}`} className="merge-said">
          <SaidValue place={place} value={place[choice]} />
        </span>
      ))}
      {conflict.kind === "lines" && (
        <pre className="code merge-lines">
          {lines && lines.text !== "" ? (
            <CodeText text={lines.text} />
          ) : (
            <span className="quiet">no lines</span>
          )}
        </pre>
      )}
      {conflict.kind === "file" && (
        <span className="merge-said quiet">{lines === null ? "the file is removed" : "the whole file"}</span>
      )}
    </>
  );
}

function SaidValue({ place, value }: { readonly place: ConflictPlace; readonly value: MergedValue | null }) {
  if (value === null) return <span className="quiet">not in the text</span>;
  return (
    <>
      {place.parameter !== null && value.value !== null ? (
        <ParameterQuantity
          parameter={place.parameter}
          value={value.value}
          unit={value.unit ?? ""}
          basis={value.basis}
        />
      ) : (
        <code className="code">
          <CodeText text={value.raw} />
        </code>
      )}
      <span className="quiet">
        {" "}
        {value.path}, line {value.line}
      </span>
    </>
  );
}

interface EffectsOfChoicesProps {
  readonly effects: readonly ChoiceEffect[];
  readonly todayLabel: string;
}

function EffectsOfChoices({ effects, todayLabel }: EffectsOfChoicesProps) {
  const choices = effects[0]?.by.map(({ choice }) => choice) ?? [];
  return (
    <Table caption="What each choice does" className="merge-effects">
      <thead>
        <tr>
          <Head>Effect</Head>
          {choices.map((choice) => (
            <Head key={choice} number>
              {choiceWords(choice, todayLabel)}
            </Head>
          ))}
        </tr>
      </thead>
      <tbody>
        {effects.map(({ axis, quantity, label, unit, by }) => (
          <tr key={`${axis}|${quantity}`}>
            <th scope="row">{onAxis(axis, label.toLowerCase())}</th>
            {by.map(({ choice, value, level }) => (
              <NumberCell key={choice}>
                {value === null ? <NoValue /> : <Quantity value={value} unit={unit} />}{" "}
                {level && <LevelMark level={level} />}
              </NumberCell>
            ))}
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
