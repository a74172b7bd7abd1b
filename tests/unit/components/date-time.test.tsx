import { cleanup, render } from "@testing-library/react";
import { renderToStaticMarkup } from "react-dom/server";
import { afterEach, describe, expect, it } from "vitest";
import { DateTime } from "@/components/ui/date-time";
import { formatDateTime } from "@/components/ui/format-date-time";

afterEach(cleanup);
const instant = "2026-11-30T23:40:00Z";

describe("formatDateTime", () => {
  it("keeps the order of ISO 8601 and names the offset", () => {
    expect(formatDateTime(new Date(instant), "UTC")).toEqual({
      date: "2026-11-30",
      time: "23:40",
      zone: "UTC",
    });
    expect(formatDateTime(new Date(instant), "Pacific/Chatham")).toEqual({
      date: "2026-12-01",
      time: "13:25",
      zone: "UTC+13:45",
    });
  });

  it("writes midnight as 00", () => {
    expect(formatDateTime(new Date("2026-01-01T00:00:00Z"), "UTC").time).toBe("00:00");
  });
});

describe("DateTime", () => {
  it("is UTC from the server and the reader's own zone in the browser", () => {
    expect(renderToStaticMarkup(<DateTime value={instant} />)).toContain("2026-11-30 23:40");
    const { container } = render(<DateTime value={instant} />);
    expect(container.textContent).toBe("2026-12-01 13:25\u00a0UTC+13:45");
    expect(container.querySelector("time")?.getAttribute("datetime")).toBe("2026-11-30T23:40:00.000Z");
  });

  it("gives the time as a hint where only the date is shown", () => {
    const { container } = render(<DateTime value={new Date(instant)} dateOnly />);
    expect(container.textContent).toBe("2026-12-01");
    expect(container.querySelector("time")?.getAttribute("title")).toBe("2026-12-01 13:25 UTC+13:45");
  });
});
