import type { ReactNode } from "react";

/** The data fields of ISO 7200:2004. Decisions are made in `status` and `approvedBy`. */
export interface TitleBlockProps {
  readonly title: ReactNode;
  readonly documentType: ReactNode;
  readonly identificationNumber: ReactNode;
  readonly revision: ReactNode;
  readonly sheet: ReactNode;
  readonly dateOfIssue: ReactNode;
  readonly creator: ReactNode;
  readonly status: ReactNode;
  readonly approvedBy: ReactNode;
  /** The reader may sign or decide here: the field is washed in copper. */
  readonly openToDecide?: boolean | undefined;
}

function Cell({
  name,
  label,
  open = false,
  children,
}: {
  name: string;
  label: string;
  open?: boolean;
  children: ReactNode;
}) {
  return (
    <div className={`title-cell title-cell-${name}${open ? " title-cell-open" : ""}`}>
      <dt>{label}</dt>
      <dd>{children}</dd>
    </div>
  );
}

/** The title block at the lower right of a sheet. */
export function TitleBlock({ openToDecide = false, ...fields }: TitleBlockProps) {
  return (
    <section className="title-block" aria-label="Title block">
      <dl>
        <Cell name="title" label="Title">
          {fields.title}
        </Cell>
        <Cell name="type" label="Document type">
          {fields.documentType}
        </Cell>
        <Cell name="number" label="Identification number">
          {fields.identificationNumber}
        </Cell>
        <Cell name="owner" label="Legal owner">
          The team that runs these machines
        </Cell>
        <Cell name="creator" label="Creator">
          {fields.creator}
        </Cell>
        <Cell name="issued" label="Date of issue">
          {fields.dateOfIssue}
        </Cell>
        <Cell name="revision" label="Revision">
          {fields.revision}
        </Cell>
        <Cell name="sheet" label="Sheet">
          {fields.sheet}
        </Cell>
        <Cell name="status" label="Status">
          {fields.status}
        </Cell>
        <Cell name="approved" label="Approved by" open={openToDecide}>
          {fields.approvedBy}
        </Cell>
      </dl>
    </section>
  );
}
