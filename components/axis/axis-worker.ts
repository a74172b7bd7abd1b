import { answerPictures, type PicturesRequest } from "@/lib/review/axis-pictures";

/** The pictures of axes, off the thread that types. */
addEventListener("message", ({ data }: MessageEvent<PicturesRequest>) => {
  postMessage(answerPictures(data));
});
