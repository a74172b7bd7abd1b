import { LevelMark } from "@/components/ui/level-mark";
import { CellMark } from "./cell-mark";

/** What the signs of the floor mean. */
export function FloorLegend() {
  return (
    <ul className="floor-legend" aria-label="Signs">
      <li>
        <span className="cell-point" aria-hidden="true" /> as required
      </li>
      <li>
        <LevelMark level="over" word={false} /> <LevelMark level="near" word={false} />{" "}
        <LevelMark level="within" word={false} />{" "}
        <span>drift up or down; its consequence over, near, within limits</span>
      </li>
      <li>
        <CellMark cell={{ kind: "deviation", title: "" }} /> permitted deviation
      </li>
      <li>
        <CellMark cell={{ kind: "not_read", title: "" }} /> not read
      </li>
    </ul>
  );
}
