import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import type { HabitatClass, Layer } from '#contract/layers.ts';
import { sayDone } from '#app/components/toast.tsx';
import { formatCounted } from '#app/lib/formats.ts';
import { setClassesMutation } from './change-layer.ts';
import { readRows, rowErrors, startRows, type ClassRow } from './class-draft.ts';

export interface ClassDraft {
  rows: readonly ClassRow[];
  /** changed by hand and not saved */
  dirty: boolean;
  /** the site has no table yet, so what is shown is a suggestion */
  suggested: boolean;
  /** rows in which something is wrong */
  wrong: number;
  saving: boolean;
  /** null while nothing went wrong */
  error: Error | null;
  change: (value: number, change: Partial<ClassRow>) => void;
  /** fills in rows by class number; answers how many were taken, and which the raster does not hold */
  fill: (classes: readonly HabitatClass[]) => { taken: number; unknown: number[] };
  save: () => void;
  revert: () => void;
}

/** The class table of a habitat layer while it is edited. Another layer starts another draft; a refetch keeps it. */
export function useClassDraft(siteId: string, layer: Layer | undefined): ClassDraft {
  const [edited, setEdited] = useState<{ layerId: string; rows: readonly ClassRow[] }>();
  const queryClient = useQueryClient();
  const save = useMutation(setClassesMutation(queryClient, siteId, layer?.id ?? ''));
  const mine = edited !== undefined && edited.layerId === layer?.id ? edited.rows : undefined;
  const rows = mine ?? (layer ? startRows(layer) : []);
  return {
    rows,
    dirty: mine !== undefined,
    suggested: layer !== undefined && layer.classes === null,
    wrong: rows.filter((row) => Object.keys(rowErrors(row)).length > 0).length,
    saving: save.isPending,
    error: save.error,
    change: (value, change) => {
      if (!layer) return;
      setEdited({
        layerId: layer.id,
        rows: rows.map((row) => (row.value === value ? { ...row, ...change } : row)),
      });
    },
    fill: (classes) => {
      const known = new Set(rows.map((row) => row.value));
      const filled = rows.map((row) => {
        const given = classes.find(({ value }) => value === row.value);
        return given ? { ...given, capacity: String(given.capacity), vigour: String(given.vigour) } : row;
      });
      if (layer) setEdited({ layerId: layer.id, rows: filled });
      const unknown = classes.map(({ value }) => value).filter((value) => !known.has(value));
      return { taken: classes.length - unknown.length, unknown };
    },
    save: () => {
      const classes = readRows(rows);
      if (!classes) return;
      save.mutate(classes, {
        onSuccess: () => {
          setEdited(undefined);
          sayDone(`Class table saved, ${formatCounted(classes.length, 'class', 'classes')}`);
        },
      });
    },
    revert: () => {
      setEdited(undefined);
      save.reset();
    },
  };
}
