/** The head of a gauge column: open dot was, filled dot to be. */
export function GaugeKey() {
  return (
    <span className="gauge-key">
      <svg width="10" height="10" viewBox="0 0 10 10" aria-hidden="true">
        <circle cx="5" cy="5" r="4" fill="none" stroke="currentColor" />
      </svg>{" "}
      was{" "}
      <svg width="10" height="10" viewBox="0 0 10 10" aria-hidden="true">
        <circle cx="5" cy="5" r="4" fill="currentColor" />
      </svg>{" "}
      to be
    </span>
  );
}
