import { cleanup, fireEvent, render, screen } from "@testing-library/react";
import { signOut } from "next-auth/react";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { Help } from "@/components/shell/help";
import { keyTarget } from "@/components/shell/keys";
import { PHONE_PLACES, placeOf, PLACES } from "@/components/shell/places";
import { Strip } from "@/components/shell/strip";

const push = vi.fn();
let path = "/changes/7";
vi.mock("next/navigation", () => ({ usePathname: () => path, useRouter: () => ({ push }) }));
vi.mock("next-auth/react", () => ({ signOut: vi.fn(() => Promise.resolve()) }));
vi.mock("next/link", () => ({ default: (props: React.ComponentProps<"a">) => <a {...props} /> }));

const person = { name: "I. Okafor", role: "approver" };

beforeEach(() => {
  path = "/changes/7";
  push.mockClear();
  window.localStorage.clear();
});
afterEach(cleanup);

describe("places", () => {
  it("light up for what lies below them, a machine under the floor", () => {
    expect(placeOf("/changes/7", PLACES)?.label).toBe("Changes");
    expect(placeOf("/machines/12/edit", PLACES)?.label).toBe("Floor");
    expect(placeOf("/catalogue", PLACES)).toBeNull();
    expect(placeOf("/settings", PLACES)).toBeNull();
  });

  it("take the longest that fits", () => {
    expect(placeOf("/readings/new", PHONE_PLACES)?.label).toBe("Add a reading");
    expect(placeOf("/readings/9", PHONE_PLACES)).toBeNull();
  });
});

describe("Strip", () => {
  it("marks the place that the reader is in", () => {
    render(<Strip person={person} site={null} />);
    const marked = screen.getAllByRole("link").filter((link) => link.getAttribute("aria-current") === "page");
    expect(marked.map((link) => link.textContent)).toEqual(["Changes"]);
  });

  it("searches by an ordinary GET", () => {
    const { container } = render(
      <Strip person={person} site={{ name: "East hall", href: "/floor?site=1" }} />,
    );
    const form = container.querySelector<HTMLFormElement>(".strip-search");
    expect([form?.getAttribute("action"), form?.getAttribute("method")]).toEqual(["/search", "get"]);
    expect(form?.querySelector("input")?.name).toBe("q");
    expect(screen.getByRole("link", { name: "East hall" }).getAttribute("href")).toBe("/floor?site=1");
  });

  it("opens the person's menu, closes it on Escape and gives the focus back", () => {
    render(<Strip person={person} site={null} />);
    const button = screen.getByRole("button", { expanded: false });
    fireEvent.click(button);
    expect(button.getAttribute("aria-expanded")).toBe("true");
    screen.getByRole("link", { name: "Settings" }).focus();
    fireEvent.keyDown(document, { key: "Escape" });
    expect(button.getAttribute("aria-expanded")).toBe("false");
    expect(document.activeElement).toBe(button);
  });

  it("closes the menu on a press outside and signs out from it", () => {
    render(<Strip person={person} site={null} />);
    const button = screen.getByRole("button", { expanded: false });
    fireEvent.click(button);
    fireEvent.click(screen.getByRole("button", { name: "Sign out" }));
    expect(signOut).toHaveBeenCalledWith({ callbackUrl: "/sign-in" });
    fireEvent.pointerDown(document.body);
    expect(button.getAttribute("aria-expanded")).toBe("false");
  });
});

describe("keys", () => {
  const held = { altKey: true, shiftKey: true, ctrlKey: false, metaKey: false };

  it("go along the strip by place of the key, whatever the layout writes there", () => {
    expect(keyTarget({ ...held, key: "!", code: "Digit1" })).toBe("/floor");
    expect(keyTarget({ ...held, key: "§", code: "Digit6" })).toBe("/record");
    expect(keyTarget({ ...held, key: "7", code: "Digit7" })).toBeNull();
    expect(keyTarget({ ...held, altKey: false, key: "!", code: "Digit1" })).toBeNull();
    expect(keyTarget({ ...held, ctrlKey: true, key: "!", code: "Digit1" })).toBeNull();
  });

  it("open the help by F1 and do nothing once they are turned off", () => {
    render(<Strip person={person} site={null} />);
    fireEvent.keyDown(window, { key: "F1", code: "F1" });
    expect(push).toHaveBeenCalledWith("/help");
    push.mockClear();
    fireEvent.click(screen.getByRole("button", { expanded: false }));
    fireEvent.click(screen.getByRole("checkbox", { name: /Keys that act at once/ }));
    fireEvent.keyDown(window, { key: "F1", code: "F1" });
    expect(push).not.toHaveBeenCalled();
    expect(window.localStorage.getItem("keepstep.keys")).toBe("off");
  });
});

describe("Help", () => {
  it("explains every level, the keys and the cautions", () => {
    const { container } = render(<Help />);
    for (const words of [
      "over limit",
      "near limit",
      "within limits",
      "cannot check",
      "F1",
      "holding current is cut",
    ])
      expect(container.textContent).toContain(words);
  });
});
