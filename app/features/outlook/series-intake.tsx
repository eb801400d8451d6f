import { useState } from 'react';
import { FileDrop } from '#app/components/file-drop.tsx';
import { TextAreaField } from '#app/components/inputs.tsx';
import { Notice } from '#app/components/notice.tsx';
import type { LineProblem } from './read-series.ts';

const longestFile = 5_000_000;

/** Text of a series, pasted or from a file that fills the same lines, so that a bad one can be mended in place. */
export function SeriesIntake(props: {
  text: string;
  placeholder: string;
  /** @param fileName of the file that the text was read from */
  onText: (text: string, fileName?: string) => void;
}) {
  const [fileName, setFileName] = useState<string>();
  const [fileError, setFileError] = useState<string>();
  const read = async (file: File) => {
    setFileName(file.name);
    if (file.size > longestFile) {
      setFileError(
        `Found a file of ${Math.round(file.size / 1e6)} MB; a series has a line a year or a month. Is it the right file?`,
      );
      return;
    }
    setFileError(undefined);
    props.onText(await file.text(), file.name);
  };
  return (
    <div className="mt-3 grid gap-4 md:grid-cols-2">
      <TextAreaField
        label="Paste it here"
        rows={8}
        value={props.text}
        spellCheck={false}
        placeholder={props.placeholder}
        onChange={(event) => props.onText(event.target.value)}
      />
      <div>
        <p className="mb-1 text-[13px] font-semibold">or take it from a file</p>
        <FileDrop
          label="Drop a CSV here"
          hint="Comma, semicolon or tab; decimal point or comma. It fills the lines beside, where you can mend them."
          accept=".csv,.txt,.tsv,text/csv,text/plain"
          fileName={fileName}
          error={fileError}
          onFile={(file) => void read(file)}
        />
      </div>
    </div>
  );
}

/** What is wrong with a series, line by line. */
export function LineProblems(props: { title: string; problems: readonly LineProblem[] }) {
  return (
    <Notice kind="problem" title={props.title}>
      <ul className="mt-1">
        {props.problems.map(({ line, message }) => (
          <li key={`${line} ${message}`}>
            {line > 0 && <b>Line {line}: </b>}
            {message}
          </li>
        ))}
      </ul>
    </Notice>
  );
}
