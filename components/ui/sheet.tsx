import type { ReactNode } from "react";

export interface SheetProps {
  readonly children: ReactNode;
  /** A page has one main sheet; a further one on the same page is a section with a label. */
  readonly as?: "main" | "section" | undefined;
  readonly label?: string | undefined;
  /** Narrow sheets carry a single form. */
  readonly width?: "full" | "narrow" | undefined;
}

/** A drawing sheet: ink frame, hairline inside it. */
export function Sheet({ children, as: Element = "main", label, width = "full" }: SheetProps) {
  return (
    <Element
      className={width === "narrow" ? "sheet sheet-narrow" : "sheet"}
      aria-label={label}
      {...(Element === "main" ? { id: "sheet", tabIndex: -1 } : {})}
    >
      <div className="sheet-inner">{children}</div>
    </Element>
  );
}

export interface SheetHeadProps {
  /** A quiet line above the title: number, effectivity, site. */
  readonly kicker?: ReactNode;
  readonly title: ReactNode;
  readonly subtitle?: ReactNode;
  /** What can be done with the sheet as a whole. */
  readonly acts?: ReactNode;
}

export function SheetHead({ kicker, title, subtitle, acts }: SheetHeadProps) {
  return (
    <header className="sheet-head">
      <div className="sheet-head-words">
        {kicker !== undefined && <p className="kicker">{kicker}</p>}
        <h1>{title}</h1>
        {subtitle !== undefined && <p className="subtitle">{subtitle}</p>}
      </div>
      {acts !== undefined && <div className="acts">{acts}</div>}
    </header>
  );
}

export interface SheetSectionProps {
  readonly title: ReactNode;
  readonly id?: string | undefined;
  /** A quiet word beside the title. */
  readonly note?: ReactNode;
  readonly acts?: ReactNode;
  readonly children: ReactNode;
}

/** A part of a sheet under a heading of its own. */
export function SheetSection({ title, id, note, acts, children }: SheetSectionProps) {
  return (
    <section className="sheet-section" id={id}>
      <div className="sheet-section-head">
        <h2>{title}</h2>
        {note !== undefined && <p className="sheet-section-note">{note}</p>}
        {acts !== undefined && <div className="acts">{acts}</div>}
      </div>
      {children}
    </section>
  );
}
