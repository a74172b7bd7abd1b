import type { ReactNode } from "react";
import { GaugeKey } from "@/components/charts/gauge-key";
import { Gauge } from "@/components/charts/gauge";
import { FloorLegend } from "@/components/floor/legend";
import { LevelMark } from "@/components/ui/level-mark";
import { RevisionMark } from "@/components/ui/revision-mark";
import { PLACES } from "./places";

function Part({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section>
      <h2>{title}</h2>
      {children}
    </section>
  );
}

function Ways() {
  return (
    <dl>
      <dt>Record what a machine runs</dt>
      <dd>
        Add a reading: drop its text, say when it was read and whether it is the file, the stored or the
        running values.
      </dd>
      <dt>Check a text without keeping it</dt>
      <dd>Readings, then “Check only”. The findings appear beside the lines they rest on.</dd>
      <dt>Change a setting</dt>
      <dd>
        From the machine or its model, propose a change: edit the text, watch the findings, give the reason,
        submit. Somebody else approves it in the title block at the foot of its sheet.
      </dd>
      <dt>Put a change onto a machine</dt>
      <dd>
        Work: download the exact text for that machine, apply it, upload the as-left text, record the test.
        What a machine requires changes when the change is released to it.
      </dd>
    </dl>
  );
}

function Signs() {
  return (
    <dl>
      <dt>
        <LevelMark level="over" />
      </dt>
      <dd>Beyond a limit. It can be approved only with a written justification.</dd>
      <dt>
        <LevelMark level="near" />
      </dt>
      <dd>Inside the limit, but closer than the margin your team keeps; also a caution or a hint.</dd>
      <dt>
        <LevelMark level="within" />
      </dt>
      <dd>Inside, with the margin.</dd>
      <dt>
        <LevelMark level="cannot" />
      </dt>
      <dd>A datum is missing; the finding names it. It is never counted as good.</dd>
      <dt>
        <RevisionMark letter="A" />
      </dt>
      <dd>A revision letter: the same at a changed line, its parameter, its effects and its comments.</dd>
      <dt>
        <GaugeKey />
        <Gauge
          reading={{ value: 64, before: 51, limit: 58, nearLimit: 48, sense: "upper" }}
          unit="°C"
          level="over"
        />
      </dt>
      <dd>
        A value against its limit. The tick is the limit, the hatching lies beyond it, the shaded part is near
        it.
      </dd>
    </dl>
  );
}

function KeyWays() {
  return (
    <dl>
      <dt>
        <kbd>F1</kbd>
      </dt>
      <dd>This page.</dd>
      {PLACES.map(({ label }, index) => (
        <div key={label} className="contents">
          <dt>
            <kbd>Alt</kbd> <kbd>Shift</kbd> <kbd>{index + 1}</kbd>
          </dt>
          <dd>{label}</dd>
        </div>
      ))}
      <dt>
        <kbd>Arrows</kbd> <kbd>Home</kbd> <kbd>End</kbd>
      </dt>
      <dd>
        In the floor map: from cell to cell, to the first and last of a row; with <kbd>Ctrl</kbd> to the ends
        of the map. <kbd>Page Up</kbd> and <kbd>Page Down</kbd> leaf, <kbd>Enter</kbd> opens the machine.
      </dd>
    </dl>
  );
}

/** The help: what to do where, what the signs mean, the keys, and the cautions. */
export function Help() {
  return (
    <div className="help">
      <Part title="What to do where">
        <Ways />
      </Part>
      <Part title="Signs">
        <Signs />
        <div className="mt-4">
          <FloorLegend />
        </div>
      </Part>
      <Part title="Keys">
        <KeyWays />
        <p className="quiet mt-3">The keys that act at once can be turned off in the menu under your name.</p>
      </Part>
      <Part title="Cautions">
        <p>
          Motors and drivers get hot, axes move without warning, and a vertical axis falls when its holding
          current is cut. The checks are estimates from catalog data: the test on the machine and a competent
          person decide. Local codes and licensed practice stand above this tool.
        </p>
      </Part>
    </div>
  );
}
