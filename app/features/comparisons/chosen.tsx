/** Beside the name of the option that was decided for. */
export function Chosen() {
  return (
    <span className="ml-1.5 inline-block border-[1.5px] border-ink px-1 text-note leading-[1.25] font-semibold whitespace-nowrap">
      chosen
    </span>
  );
}

/** An option's name in a table, with the mark where it was decided for. */
export function OptionName(props: { name: string; chosen: boolean }) {
  return (
    <>
      <b>{props.name}</b>
      {props.chosen && <Chosen />}
    </>
  );
}
