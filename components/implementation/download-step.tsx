"use client";

import { apiCall } from "@/components/api";
import { Refusal } from "@/components/forms/refusal";
import { useSave } from "@/components/forms/use-save";
import { Button } from "@/components/ui/button";
import { plural } from "@/lib/domain/sentences";

interface Downloaded {
  readonly files: readonly { readonly path: string; readonly base64: string }[];
}

/** Saves bytes under a name, exactly as they came. */
function saveFile({ path, base64 }: Downloaded["files"][number]): void {
  const bytes = Uint8Array.from(atob(base64), (letter) => letter.charCodeAt(0));
  const url = URL.createObjectURL(new Blob([bytes], { type: "application/octet-stream" }));
  const link = document.createElement("a");
  link.href = url;
  link.download = path.split("/").at(-1) ?? path;
  link.click();
  URL.revokeObjectURL(url);
}

export interface DownloadStepProps {
  readonly changeId: string;
  readonly machineId: string;
  readonly serial: string;
  readonly again: boolean;
}

/** Fetches the exact text for this machine; from now on its read-back counts. */
export function DownloadStep({ changeId, machineId, serial, again }: DownloadStepProps) {
  const save = useSave({
    send: () =>
      apiCall<Downloaded>("POST", `/changes/${changeId}/machines/${machineId}/download`, { body: {} }),
    onSaved: ({ files }) => files.forEach(saveFile),
  });
  return (
    <>
      <Button
        variant={again ? "plain" : "primary"}
        busy={save.isPending}
        onClick={() => save.mutate(undefined)}
      >
        {again ? "Download it again" : `Download the text for ${serial}`}
      </Button>
      <Refusal error={save.error} title="Not downloaded" />
      {save.data && <p role="status">{plural(save.data.files.length, "file")} saved.</p>}
    </>
  );
}
