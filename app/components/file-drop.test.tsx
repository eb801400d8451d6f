import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { FileDrop } from './file-drop.tsx';

afterEach(cleanup);
const file = new File(['x'], 'cover.tif');
const other = new File(['y'], 'habitat.tif');
const transfer = { files: [file, other] };

describe('FileDrop', () => {
  it('takes a file that is dropped', () => {
    const onFile = vi.fn();
    render(<FileDrop label="Drop a GeoTIFF here" onFile={onFile} />);
    fireEvent.drop(screen.getByText('Drop a GeoTIFF here'), { dataTransfer: transfer });
    expect(onFile.mock.calls).toEqual([[file]]);
  });

  it('takes several where it may', () => {
    const onFiles = vi.fn();
    render(<FileDrop label="Drop GeoTIFFs here" onFiles={onFiles} />);
    fireEvent.drop(screen.getByText('Drop GeoTIFFs here'), { dataTransfer: transfer });
    expect(onFiles.mock.calls).toEqual([[[file, other]]]);
  });

  it('takes a file that is chosen, and the same one again', () => {
    const onFile = vi.fn();
    render(<FileDrop label="Drop a GeoTIFF here" onFile={onFile} />);
    const input = screen.getByLabelText<HTMLInputElement>(/Drop a GeoTIFF/);
    fireEvent.change(input, { target: { files: transfer.files } });
    expect(onFile).toHaveBeenCalledWith(file);
    expect(input.value).toBe('');
  });

  it('takes none while disabled', () => {
    const onFile = vi.fn();
    render(<FileDrop label="Drop a GeoTIFF here" onFile={onFile} disabled />);
    fireEvent.drop(screen.getByText('Drop a GeoTIFF here'), { dataTransfer: transfer });
    expect(onFile).not.toHaveBeenCalled();
  });

  it('says what is wrong with the file', () => {
    render(<FileDrop label="Drop" hint="One band" error="This is no GeoTIFF" onFile={() => undefined} />);
    const input = screen.getByLabelText(/Drop/);
    const note = document.getElementById(input.getAttribute('aria-describedby') ?? '');
    expect(note?.textContent).toBe('This is no GeoTIFF');
  });
});
