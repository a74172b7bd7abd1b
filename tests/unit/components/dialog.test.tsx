import { cleanup, fireEvent, render, screen } from "@testing-library/react";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { Dialog } from "@/components/ui/dialog";

// jsdom knows the element but not its modal state.
beforeEach(() => {
  HTMLDialogElement.prototype.showModal = function showModal() {
    this.open = true;
  };
  HTMLDialogElement.prototype.close = function close() {
    this.open = false;
  };
});
afterEach(cleanup);

describe("Dialog", () => {
  it("opens as modal under its title and closes when told", () => {
    const { rerender } = render(
      <Dialog open onClose={() => undefined} title="Withdraw">
        <p>The text is kept.</p>
      </Dialog>,
    );
    const dialog = screen.getByRole("dialog", { name: "Withdraw" });
    expect(dialog.hasAttribute("open")).toBe(true);
    rerender(
      <Dialog open={false} onClose={() => undefined} title="Withdraw">
        <p>The text is kept.</p>
      </Dialog>,
    );
    expect(dialog.hasAttribute("open")).toBe(false);
  });

  it("asks to be closed on Escape and on a press outside, not on a press inside", () => {
    const close = vi.fn();
    render(
      <Dialog open onClose={close} title="Withdraw">
        <p>The text is kept.</p>
      </Dialog>,
    );
    fireEvent.click(screen.getByText("The text is kept."));
    expect(close).not.toHaveBeenCalled();
    fireEvent.click(screen.getByRole("dialog"));
    fireEvent(screen.getByRole("dialog"), new Event("cancel", { cancelable: true }));
    expect(close).toHaveBeenCalledTimes(2);
  });
});
