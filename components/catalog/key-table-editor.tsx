"use client";

import { useRouter } from "next/navigation";
import { useMemo, useState } from "react";
import { Button } from "@/components/ui/button";
import { Empty } from "@/components/ui/empty";
import { TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { SheetSection } from "@/components/ui/sheet";
import type { KeyRule } from "@/lib/domain/key-table";
import type { AxisShape } from "@/lib/keytable/types";
import type { KeyTableView } from "@/lib/schemas/key-tables";
import { rowTrouble, suggestedRow, toRow, toRule, usableRules, type RuleRow } from "./rule-rows";
import { RuleTable } from "./rule-table";
import { SaveTrouble } from "./save-trouble";
import { TryText } from "./try-text";
import { useSave } from "./use-save";

export interface KeyTableEditorProps {
  readonly table: Pick<KeyTableView, "modelId" | "version" | "rules">;
  readonly axes: readonly AxisShape[];
  readonly mayWrite: boolean;
}

interface Removed {
  readonly index: number;
  readonly row: RuleRow;
}

/** Rows under work: each has an id of its own, so that entries keep their place while rows come and go. */
function useRows({ version, rules }: { readonly version: number; readonly rules: readonly KeyRule[] }) {
  const [seen, setSeen] = useState(version);
  const [rows, setRows] = useState<readonly RuleRow[]>(() => rules.map(toRow));
  const [removed, setRemoved] = useState<Removed | null>(null);
  // A version saved here or loaded anew takes the place of the rows under work.
  if (seen !== version) {
    setSeen(version);
    setRows(rules.map(toRow));
    setRemoved(null);
  }
  const nextId = rows.reduce((highest, { id }) => Math.max(highest, id), removed?.row.id ?? -1) + 1;
  return {
    rows,
    removed,
    nextId,
    add: (row: RuleRow) => setRows([...rows, row]),
    change: (row: RuleRow) => setRows(rows.map((old) => (old.id === row.id ? row : old))),
    remove: (row: RuleRow) => {
      setRemoved({ index: rows.findIndex(({ id }) => id === row.id), row });
      setRows(rows.filter(({ id }) => id !== row.id));
    },
    putBack: () => {
      if (removed) setRows([...rows.slice(0, removed.index), removed.row, ...rows.slice(removed.index)]);
      setRemoved(null);
    },
  };
}

/** The key table of a model under work, beside a text that it is tried on. */
export function KeyTableEditor({ table, axes, mayWrite }: KeyTableEditorProps) {
  const router = useRouter();
  const { rows, removed, nextId, ...edit } = useRows(table);
  const [note, setNote] = useState("");
  const save = useSave<KeyTableView>({
    onSaved: () => {
      setNote("");
      router.refresh();
    },
  });
  const rules = useMemo(() => usableRules(rows), [rows]);
  const wrong = rows.filter((row) => rowTrouble(row) !== null).length;
  const empty: RuleRow = {
    id: nextId,
    key: "",
    parameter: "run_current",
    axis: "",
    unit: "",
    basis: "",
    layer: "",
  };
  const submit = (): void =>
    save.mutate({
      method: "POST",
      path: "/key-tables",
      body: { modelId: table.modelId, rules: rows.map(toRule), note },
      ifMatch: table.version,
    });
  return (
    <>
      {rows.length === 0 ? (
        <Empty>
          A row says which key of a text is which parameter. Paste a text below and accept what is suggested,
          or add rows by hand.
        </Empty>
      ) : (
        <RuleTable
          rows={rows}
          axes={axes.map(({ axis }) => axis)}
          readOnly={!mayWrite}
          onChange={edit.change}
          onRemove={edit.remove}
        />
      )}
      {removed && (
        <Notice live="status" acts={<Button onClick={edit.putBack}>Put it back</Button>}>
          <p>The row {removed.row.key} is removed. It is gone once you save.</p>
        </Notice>
      )}
      {mayWrite && (
        <div className="acts mt-3">
          <Button onClick={() => edit.add(empty)}>Add a row</Button>
        </div>
      )}
      <TryText
        rules={rules}
        axes={axes}
        onAccept={mayWrite ? (key, suggestion) => edit.add(suggestedRow(key, suggestion, nextId)) : null}
      />
      {mayWrite && (
        <SheetSection title="Save">
          <TextField
            label="What changed and why"
            optional
            maxLength={1000}
            value={note}
            onChange={(event) => setNote(event.target.value)}
          />
          <SaveTrouble error={save.error} onLoad={save.reset} />
          {save.isSuccess && (
            <Notice live="status">
              <p>Saved as version {save.data.version}. The machines of this model are being checked again.</p>
            </Notice>
          )}
          {wrong > 0 && (
            <p className="field-error">Put right the rows that are marked before saving: {wrong}.</p>
          )}
          <div className="acts mt-4">
            <Button variant="primary" busy={save.isPending} disabled={wrong > 0} onClick={submit}>
              Save as version {table.version + 1}
            </Button>
          </div>
        </SheetSection>
      )}
    </>
  );
}
