/**
 * The start of the SHA-256 of a raster on the grid and of the file that it was made from, each said of which it is; of one
 * alone where the file itself lies on the grid.
 */
export function RasterHashes({ hash, sourceHash }: { hash: string; sourceHash: string }) {
  if (hash === sourceHash) return <Hash of="file as it came, and raster on the grid" hash={hash} />;
  return (
    <>
      <Hash of="file as it came" hash={sourceHash} />
      <Hash of="raster on the grid" hash={hash} />
    </>
  );
}

/** Enough of a hash to compare by eye. */
const Hash = ({ of, hash }: { of: string; hash: string }) => (
  <span className="block text-axis text-ink-2" title={`SHA-256 ${hash}`}>
    {of}:{' '}
    <span className="whitespace-nowrap">
      SHA-256 <span className="font-mono">{hash.slice(0, 12)}…</span>
    </span>
  </span>
);
