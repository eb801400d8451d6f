import { useState, type ReactNode } from 'react';
import { getLayerFile } from '#contract/ground.ts';
import type { Layer } from '#contract/layers.ts';
import { RasterHashes } from '#app/components/raster-hashes.tsx';
import { WordAnchor, WordButton } from '#app/components/word-button.tsx';
import { endpointUrl } from '#app/lib/api-client.ts';
import { Histogram } from './histogram.tsx';
import { LayerHistory } from './layer-history.tsx';
import { LayerNote } from './layer-note.tsx';
import { alignmentInWords, noDataInWords, sourceInWords } from './layer-words.ts';
import { hasUnit, partLabels } from './part-words.ts';
import { RemoveLayer } from './remove-layer.tsx';
import { ReplaceLayer } from './replace-layer.tsx';

/** One layer of a site as a note in the margin: the file, who brought it, what its values are. */
export function LayerEntry(props: {
  siteId: string;
  layer: Layer;
  /** shown on the map now */
  shown: boolean;
  onShow: () => void;
  editable: boolean;
  /** another file for the same part */
  onFile: (file: File) => void;
  /** what its values mean: a unit, a class table */
  children?: ReactNode;
}) {
  const { siteId, layer, editable } = props;
  const { part, source } = layer;
  const [history, setHistory] = useState(false);
  const title = layer.year === null ? partLabels[part] : `${partLabels[part]} of ${layer.year}`;
  const word = title.toLowerCase();
  return (
    <section className="border-t border-rule py-2.5" aria-label={title}>
      <div className="flex items-baseline justify-between gap-3">
        <h2 className="text-body">{title}</h2>
        <WordButton pressed={props.shown} onClick={props.onShow}>
          {props.shown ? 'on the map' : 'show'}
          <span className="sr-only"> {word}</span>
        </WordButton>
      </div>
      <p className="text-note wrap-anywhere text-ink-2">
        <span className="font-mono text-ink">{source.fileName}</span>, {sourceInWords(layer)}
        <RasterHashes hash={layer.hash} sourceHash={source.hash} />
      </p>
      {hasUnit(part) && <Histogram layer={layer} />}
      <p className="text-note text-ink-2">
        {alignmentInWords(layer)} {noDataInWords(layer)}
      </p>
      <LayerNote siteId={siteId} layer={layer} editable={editable} />
      {props.children !== undefined && <div className="mt-1.5 text-note">{props.children}</div>}
      <div className="mt-1 flex flex-wrap gap-x-3">
        {editable && <ReplaceLayer part={part} onFile={props.onFile} />}
        <WordButton onClick={() => setHistory(true)}>
          history<span className="sr-only"> of {word}</span>
        </WordButton>
        <WordAnchor
          href={endpointUrl(getLayerFile, { params: { siteId, hash: layer.hash } })}
          download
          className="border-transparent hover:border-rule"
        >
          GeoTIFF<span className="sr-only"> of {word}</span>
        </WordAnchor>
        {editable && <RemoveLayer siteId={siteId} layer={layer} />}
      </div>
      {history && (
        <LayerHistory siteId={siteId} part={part} editable={editable} onClose={() => setHistory(false)} />
      )}
    </section>
  );
}
