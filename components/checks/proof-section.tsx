import { Head, NumberCell, Table } from "@/components/ui/table";
import { SheetSection } from "@/components/ui/sheet";
import published from "./published-values.json";

interface Topic {
  readonly topic: string;
  readonly rows: number;
  readonly values: number;
  readonly lookedUp: number;
  readonly fromMemory: number;
  readonly derived: number;
  readonly largestDeviation: string;
  readonly sources: readonly string[];
}

function TopicRow({ topic }: { readonly topic: Topic }) {
  return (
    <tr>
      <th scope="row">{topic.topic}</th>
      <NumberCell>{topic.rows}</NumberCell>
      <NumberCell>{topic.values}</NumberCell>
      <NumberCell>{topic.lookedUp}</NumberCell>
      <NumberCell>{topic.fromMemory}</NumberCell>
      <NumberCell>{topic.derived}</NumberCell>
      <NumberCell>{topic.largestDeviation}</NumberCell>
    </tr>
  );
}

/** The published values that the formulas are held against, topic by topic, with their sources. */
export function ProofSection() {
  const topics: readonly Topic[] = published.topics;
  const rows = topics.reduce((sum, topic) => sum + topic.rows, 0);
  return (
    <SheetSection title="Held against published values" id="proof">
      <p>
        {rows} worked examples, tables and derived values stand beside what the formulas here give. A row is
        looked up in its source, known from memory, or derived from the formula by another way. Most of a
        deviation is the rounding of the printed value.
      </p>
      <Table caption="Published values by topic" captionHidden>
        <thead>
          <tr>
            <Head>Topic</Head>
            <Head number>Rows</Head>
            <Head number>Values</Head>
            <Head number>Looked up</Head>
            <Head number>From memory</Head>
            <Head number>Derived</Head>
            <Head number>Largest deviation</Head>
          </tr>
        </thead>
        <tbody>
          {topics.map((topic) => (
            <TopicRow key={topic.topic} topic={topic} />
          ))}
        </tbody>
      </Table>
      <Sources topics={topics} />
    </SheetSection>
  );
}

function Sources({ topics }: { readonly topics: readonly Topic[] }) {
  return (
    <>
      <details className="mt-2">
        <summary>Sources of the published values</summary>
        <dl>
          {topics.map(({ topic, sources }) => (
            <div key={topic}>
              <dt>{topic}</dt>
              {sources.map((source) => (
                <dd key={source}>{source}</dd>
              ))}
            </div>
          ))}
        </dl>
      </details>
      <details className="mt-2">
        <summary>Published values that are not used here, and why</summary>
        <ul className="list-disc pl-5">
          {published.notUsed.map(({ value, source, reason }) => (
            <li key={value}>
              {value} ({source}): {reason}.
            </li>
          ))}
        </ul>
      </details>
    </>
  );
}
