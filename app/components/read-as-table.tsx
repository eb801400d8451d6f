/** The numbers behind a picture, for those who would rather read them. */
export function ReadAsTable(props: {
  caption: string;
  heads: readonly string[];
  rows: readonly (readonly string[])[];
}) {
  return (
    <details className="text-note">
      <summary className="inline-block min-h-7 touch:min-h-11 border-b-2 border-rule leading-7 hover:border-ink touch:leading-[44px]">
        Read as a table
      </summary>
      <table className="mt-1 w-full border-collapse">
        <caption className="pb-1 text-left font-semibold text-ink-2">{props.caption}</caption>
        <thead>
          <tr>
            {props.heads.map((head) => (
              <th key={head} scope="col" className="text-right font-semibold text-ink-2 first:text-left">
                {head}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {props.rows.map(([first, ...rest]) => (
            <tr key={first} className="border-t border-rule-2">
              <th scope="row" className="text-left font-normal">
                {first}
              </th>
              {rest.map((cell, i) => (
                <td key={i} className="text-right">
                  {cell}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </details>
  );
}
