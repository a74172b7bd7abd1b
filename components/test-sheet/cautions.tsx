/** Where a test starts: what can hurt. */
export function TestCautions({ falls }: { readonly falls: boolean }) {
  return (
    <p className="caution">
      Motors and drivers may be hot. Expect unexpected motion; a failing level stalls the axis with noise.
      Keep hands and hair out, and the stop within reach.{" "}
      {falls &&
        "This axis carries weight: it falls when the holding current is cut or steps are lost. Block it. "}
      Prediction and estimate are aids: the test and a competent person decide, under local rules.
    </p>
  );
}
