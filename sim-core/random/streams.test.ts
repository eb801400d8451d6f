import seedrandom from 'seedrandom';
import { expect, test } from 'vitest';
import { philoxKey, stream } from './streams.ts';

test('seedrandom 3.0.5 gives its published sequences for the seed hello.', () => {
  // Source: README and tests of seedrandom 3.0.5; the fourth and fifth numbers by running it.
  const arc4 = seedrandom('hello.');
  expect([arc4(), arc4(), arc4(), arc4(), arc4()]).toEqual([
    0.9282578795792454, 0.3752569768646784, 0.7316977468919549, 0.23707962084956113, 0.06057665448709666,
  ]);
  expect(seedrandom('hello.').double()).toBe(0.9282578795792454);
  expect(seedrandom('hello.').int32()).toBe(-308130061);
  const mixed = seedrandom('hello.');
  expect([mixed(), mixed(), mixed.quick(), mixed.int32()]).toEqual([
    0.9282578795792454, 0.3752569768646784, 0.7316977467853576, 1966374204,
  ]);
});

test.each([
  ['alea', [0.4783254903741181, 0.8297006865032017, 0.46924330526962876], 0.4783254905672978, 2054392338],
  ['xor128', [0.698391932528466, 0.6919899098575115, 0.5514540106523782], 0.6983922443341779, -1295396786],
  ['tychei', [0.4676165450364351, 0.794256798690185, 0.8909397614188492], 0.46761645996894774, 2008397768],
  ['xorwow', [0.14254314289428294, 0.5642471052706242, 0.8030998287722468], 0.14254310810427917, 612218137],
  ['xor4096', [0.9798525865189731, 0.035834695445373654, 0.9905578466132283], 0.9798522166417577, -86532482],
  [
    'xorshift7',
    [0.7404357127379626, 0.017942105419933796, 0.1670631943270564],
    0.7404356088362243,
    -1114820125,
  ],
] as const)('seedrandom %s too', (name, three, double, int32) => {
  const of = seedrandom[name as 'alea'];
  const random = of('hello.');
  expect([random(), random(), random()]).toEqual(three);
  expect(of('hello.').double()).toBe(double);
  expect(of('hello.').int32()).toBe(int32);
});

test('each purpose and replicate has a stream and a key of its own', () => {
  expect(stream('a', 'shoots/1')()).toBe(seedrandom('a/shoots/1')());
  const words = seedrandom('a/shoots/1');
  expect(philoxKey('a', 'shoots/1')).toEqual({ k0: words.int32() >>> 0, k1: words.int32() >>> 0 });
  const keys = (['shoots/1', 'shoots/2', 'events/1', 'survey'] as const).map((purpose) =>
    JSON.stringify(philoxKey('a', purpose)),
  );
  expect(new Set(keys).size).toBe(4);
});
