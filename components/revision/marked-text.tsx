import type { CSSProperties, ReactNode } from "react";
import { splitLines, withoutLineEnd } from "@/lib/diff/text-lines";
import { gravest, type Level } from "@/lib/domain/levels";
import { LevelMark } from "@/components/ui/level-mark";
import { RevisionMarks } from "@/components/ui/revision-mark";
import { CodeText } from "./code-text";
import { lineId } from "./line-anchor";

/** What the checks say about a line. */
export interface LineMark {
  /** From 1. */
  readonly line: number;
  readonly level: Level;
  /** The finding's sentence. */
  readonly sentence: string;
}

export interface MarkedTextProps {
  readonly text: string;
  readonly path: string;
  /** Which of the page's texts this is, from 0; sets the lines' addresses. */
  readonly index?: number | undefined;
  readonly marks?: readonly LineMark[] | undefined;
  /** Revision letters by line. */
  readonly letters?: Readonly<Record<number, readonly string[]>> | undefined;
  /** What stands below a line, e.g. a question about it. */
  readonly notes?: Readonly<Record<number, ReactNode>> | undefined;
}

/** Lines in one block of a long text: blocks out of sight cost no layout. */
const BLOCK = 200;
/** Blocks from which on a text is long. */
const LONG = 5;
/** Pixels of a line, as the style sheet has it. */
const LINE = 24;

function marksByLine(marks: readonly LineMark[]): Map<number, LineMark[]> {
  const byLine = new Map<number, LineMark[]>();
  for (const mark of marks) byLine.set(mark.line, [...(byLine.get(mark.line) ?? []), mark]);
  return byLine;
}

function Margin({ marks, letters }: { marks: readonly LineMark[] | undefined; letters: readonly string[] }) {
  if (!marks && letters.length === 0) return <span className="line-margin" />;
  return (
    <span className="line-margin" title={marks?.map(({ sentence }) => sentence).join("\n")}>
      <RevisionMarks letters={letters} />
      {marks && <LevelMark level={gravest(marks.map(({ level }) => level))} word={false} />}
    </span>
  );
}

/** A marked line's number is a link to it, for passing on; the others are plain, so that Tab goes from mark to mark. */
function LineNumber({ number, id }: { number: number; id: string | null }) {
  if (id === null) return <span className="line-number">{number}</span>;
  return (
    <a className="line-number" href={`#${id}`} aria-label={`line ${number}`}>
      {number}
    </a>
  );
}

/** A configuration text with line numbers, addresses (#L12) and a level mark at each line that a finding rests on. */
export function MarkedText({ text, path, index = 0, marks = [], letters = {}, notes = {} }: MarkedTextProps) {
  const lines = splitLines(text).map(withoutLineEnd);
  const byLine = marksByLine(marks);
  const blocks = Array.from({ length: Math.ceil(lines.length / BLOCK) }, (_, block) => block * BLOCK);
  const widest = { "--digits": String(lines.length).length } as CSSProperties;
  return (
    <div className="code-sheet" role="group" aria-label={`Text of ${path}`} style={widest}>
      {blocks.map((start) => {
        const block = lines.slice(start, start + BLOCK);
        const height = { containIntrinsicBlockSize: `auto ${block.length * LINE}px` };
        return (
          <ol
            key={start}
            className={blocks.length > LONG ? "code-lines code-block" : "code-lines"}
            start={start + 1}
            style={height}
          >
            {block.map((line, offset) => {
              const number = start + offset + 1;
              return (
                <li key={number} id={lineId(index, number)} className="code-line">
                  <Margin marks={byLine.get(number)} letters={letters[number] ?? []} />
                  <LineNumber number={number} id={byLine.has(number) ? lineId(index, number) : null} />
                  <span className="line-text">
                    <CodeText text={line} />
                  </span>
                  {notes[number] !== undefined && <div className="line-note">{notes[number]}</div>}
                </li>
              );
            })}
          </ol>
        );
      })}
    </div>
  );
}
