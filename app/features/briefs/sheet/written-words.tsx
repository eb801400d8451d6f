/** Paragraphs and lists of a text in which a line that begins with a hyphen is an item. */
export function WrittenWords({ words }: { words: string }) {
  const groups: { item: boolean; lines: string[] }[] = [];
  for (const line of words.split(/\n+/).map((each) => each.trim())) {
    if (line === '') continue;
    const item = /^[-–•]\s+/.exec(line);
    const text = item ? line.slice(item[0].length) : line;
    const last = groups.at(-1);
    if (item && last?.item) last.lines.push(text);
    else groups.push({ item: item !== null, lines: [text] });
  }
  return groups.map(({ item, lines }, i) =>
    item ? (
      <ul key={i} className="my-1 list-none">
        {lines.map((line, k) => (
          <li key={k} className="relative my-0.5 pl-4 before:absolute before:left-0 before:content-['–']">
            {line}
          </li>
        ))}
      </ul>
    ) : (
      <p key={i} className="my-1 break-words">
        {lines[0]}
      </p>
    ),
  );
}
