/** A place that is being filled. */
export const Loading = ({ what = "Loading" }: { what?: string }) => (
  <p className="p-8 text-soft" role="status">
    {what}…
  </p>
);
