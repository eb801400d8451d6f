import { useId, useState, type DragEvent } from 'react';
import { classNames } from '#app/lib/class-names.ts';

/**
 * Takes one file, or several with `onFiles`, dropped or chosen. The whole field is the label of the file input, so
 * keys and pointer both work.
 */
export function FileDrop(props: {
  /** `Drop a GeoTIFF here` */
  label: string;
  /** what is expected of the file */
  hint?: string;
  /** as the file input takes it: `.tif,.tiff` */
  accept?: string;
  /** the file chosen so far */
  fileName?: string;
  error?: string;
  disabled?: boolean;
  onFile?: (file: File) => void;
  /** takes all files at once instead */
  onFiles?: (files: File[]) => void;
}) {
  const id = useId();
  const [over, setOver] = useState(false);
  const drop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    if (!props.disabled) take([...event.dataTransfer.files]);
  };
  const take = (files: File[]) => {
    if (files.length === 0) return;
    props.onFile?.(files[0]);
    props.onFiles?.(files);
  };
  return (
    <div>
      <label
        htmlFor={id}
        onDragOver={(event) => {
          event.preventDefault();
          setOver(true);
        }}
        onDragLeave={() => setOver(false)}
        onDrop={drop}
        className={classNames(
          'relative flex min-h-28 cursor-pointer flex-col items-start justify-center gap-0.5 rounded-edge border-[1.5px] px-5 py-4',
          'has-focus-visible:outline-[2.5px] has-focus-visible:outline-offset-2 has-focus-visible:outline-focus',
          'has-disabled:cursor-not-allowed has-disabled:text-ink-3',
          over ? 'border-ink bg-sheet' : 'border-dashed border-ink-3 hover:border-ink',
          props.error !== undefined && 'border-danger',
        )}
      >
        <input
          id={id}
          type="file"
          accept={props.accept}
          multiple={props.onFiles !== undefined}
          disabled={props.disabled}
          aria-invalid={props.error !== undefined || undefined}
          aria-describedby={`${id}-note`}
          className="absolute inset-0 cursor-inherit opacity-0"
          onChange={(event) => {
            const files = [...(event.target.files ?? [])];
            // Emptied, so that the same file, mended, can be chosen again.
            event.target.value = '';
            take(files);
          }}
        />
        <b className="text-lead">{props.fileName ?? props.label}</b>
        <span className="text-[13.5px] underline decoration-rule decoration-2 underline-offset-4">
          {props.onFiles
            ? 'or choose files'
            : props.fileName === undefined
              ? 'or choose a file'
              : 'choose another'}
        </span>
      </label>
      <p
        id={`${id}-note`}
        className={classNames('mt-1 text-note', props.error === undefined ? 'text-ink-2' : 'text-danger')}
      >
        {props.error ?? props.hint}
      </p>
    </div>
  );
}
