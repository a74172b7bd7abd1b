import { answerPictures, type PicturesRequest, readBefore } from "@/lib/review/axis-pictures";

/** What the last change was reckoned from, and as what it was read. */
let kept: { readonly key: string; readonly before: ReturnType<typeof readBefore> } = {
  key: "",
  before: null,
};

function beforeOf(request: PicturesRequest): ReturnType<typeof readBefore> {
  if (request.kind === "axis") return null;
  const { keyTable, assembly, policy } = request.texts;
  const key = JSON.stringify([request.base, keyTable, assembly, policy]);
  if (key !== kept.key) kept = { key, before: readBefore(request) };
  return kept.before;
}

/** The pictures of axes, off the thread that types. */
addEventListener("message", ({ data }: MessageEvent<PicturesRequest>) => {
  postMessage(answerPictures(data, beforeOf(data)));
});
