export interface ClusterOptions {
  readonly home: string;
  readonly name?: string;
  readonly settings?: readonly string[];
  readonly signal?: AbortSignal;
  readonly env?: Readonly<Record<string, string | undefined>>;
}

export class Cluster {
  constructor(options: ClusterOptions);
  /** Connection string of its maintenance database. */
  get url(): string;
  /** Starts the cluster, making it when there is none; it runs until its last user stops it. */
  start(say?: (text: string) => void): Promise<void>;
  stop(): Promise<void>;
}

/** The cluster of the tests: fast, and allowed to forget everything when the machine loses power. */
export function testCluster(options: Pick<ClusterOptions, "home" | "signal">): Cluster;
