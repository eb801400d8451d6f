/** Why long work waits, while it does, and why it failed, where it did. */
export function WorkTrouble(props: {
  trouble: string | undefined;
  /** undefined unless the work failed */
  failure: string | undefined;
}) {
  return (
    <>
      {props.trouble && (
        <p role="status" className="border-l-[6px] border-flag py-1 pl-3">
          {props.trouble}
        </p>
      )}
      {props.failure !== undefined && (
        <p role="alert" className="border-l-[6px] border-danger py-1 pl-3">
          {props.failure}
        </p>
      )}
    </>
  );
}
