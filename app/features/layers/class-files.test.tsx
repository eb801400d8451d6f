import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, expect, it, vi } from 'vitest';
import { ClassFiles } from './class-files.tsx';

afterEach(cleanup);

const choose = (text: string) =>
  fireEvent.change(screen.getByLabelText('Class table as CSV'), {
    target: { files: [new File([text], 'classes.csv')] },
  });
const good = 'value,name,colour,capacity,vigour\n1,Creek,#8496a2,0,0\n9,Dune,#cfc3a6,0.1,0.2\n';

it('hands over what it read, and says what the raster does not hold', async () => {
  const onImport = vi.fn(() => ({ taken: 1, unknown: [9] }));
  render(<ClassFiles classes={[]} fileName="a.csv" onImport={onImport} />);
  choose(good);
  expect(await screen.findByText(/1 class filled in from classes\.csv.*Left out.*: 9\./)).toBeTruthy();
  expect(onImport).toHaveBeenCalledWith([
    { value: 1, name: 'Creek', colour: '#8496a2', capacity: 0, vigour: 0 },
    { value: 9, name: 'Dune', colour: '#cfc3a6', capacity: 0.1, vigour: 0.2 },
  ]);
});

it('says at which row it cannot be read, and changes nothing', async () => {
  const onImport = vi.fn();
  render(<ClassFiles classes={[]} fileName="a.csv" onImport={onImport} />);
  choose(good.replace('0.1', '11'));
  expect(await screen.findByText('Row 3:')).toBeTruthy();
  expect(onImport).not.toHaveBeenCalled();
});

it('only gives the table out to those who may not change it', () => {
  render(<ClassFiles classes={[]} fileName="a.csv" onImport={undefined} />);
  expect(screen.queryByRole('button', { name: 'Fill in from CSV' })).toBeNull();
  expect(screen.getByRole('button', { name: 'Classes as CSV' })).toBeTruthy();
});
