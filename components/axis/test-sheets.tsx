"use client";

import { TEST_WORDS, TESTS } from "@/lib/domain/test-sheets";
import { ButtonLink } from "@/components/ui/button";
import { SheetSection } from "@/components/ui/sheet";
import type { AxisBasis } from "./types";

/** From an axis to its tests on the machine. */
export function TestSheetSection({ basis: { machineId, axis } }: { readonly basis: AxisBasis }) {
  const at = (test: string) =>
    `/test-sheets/new?${new URLSearchParams({ machineId, axis, test }).toString()}`;
  return (
    <SheetSection title="Test on the machine" id="tests" note="settles what the physics cannot">
      <ul className="moved-tests">
        {TESTS.map((test) => (
          <li key={test}>
            <ButtonLink variant="quiet" href={at(test)}>
              {TEST_WORDS[test].title}
            </ButtonLink>
            <p className="quiet">{TEST_WORDS[test].trial}</p>
          </li>
        ))}
      </ul>
      <ButtonLink href={`/test-sheets?${new URLSearchParams({ machineId, axis, state: "all" }).toString()}`}>
        Test sheets of this axis
      </ButtonLink>
    </SheetSection>
  );
}
