import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { BriefText } from '#contract/brief-content.ts';
import type { Brief, BriefSummary } from '#contract/briefs.ts';
import type { Comparison } from '#contract/comparisons.ts';
import type { Problem } from '#contract/problem.ts';
import type { Site } from '#contract/sites.ts';
import { binaryReply } from '#server/testing/binary-reply.ts';
import { fillComparison, makeTestBrief, startTestComparison } from '#server/testing/comparisons.ts';
import { noPdfTools, pdfFacts, pdfFonts, pdfPixels, pdfText } from '#server/testing/pdf-tools.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import { packed, sendBytes } from '#server/testing/runs.ts';
import { makeSite, storedFiles } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
let site: Site;
let comparison: Comparison;
let brief: Brief;
beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server, 'Briefing team');
  site = await makeSite(team.agents.modeller, team.teamId);
  const { originX, originY, cellSize } = site.grid;
  const mound = { kind: 'mound', year: 2025, x: originX + cellSize, y: originY - cellSize, radius: 2 };
  await team.agents.manager
    .post(`/api/sites/${site.id}/options`)
    .send({ name: 'Mounds', works: [mound] })
    .expect(200);
  comparison = await startTestComparison(team.agents.modeller, site);
  for (const option of [0, 1])
    await sendBytes(
      team.agents.modeller,
      `/api/sites/${site.id}/comparisons/${comparison.id}/ensembles/${option}/0/maps/closing?replicates=4`,
      packed(
        Int16Array.from({ length: 24 }, (_, i) => (i % 6 === 0 ? -32768 : i % 5 === 0 ? 0 : 2024 + (i % 4))),
      ),
    ).expect(204);
  brief = await makeTestBrief(team.agents.manager, site, comparison);
});
afterAll(() => server.close());

const pathOf = (rest = '', id = brief.id) => `/api/sites/${site.id}/briefs/${id}${rest}`;
const pdfOf = async (version: number, id = brief.id) =>
  (await binaryReply(team.agents.trainer.get(pathOf(`/versions/${version}/brief.pdf`, id))).expect(200))
    .body as Buffer;
const withWords = (text: BriefText, part: string, words: string): BriefText => ({
  ...text,
  parts: text.parts.map((each) => (each.part === part ? { ...each, words } : each)),
});
const save = (base: number, text: BriefText, more: object = {}) =>
  team.agents.manager.post(pathOf('/versions')).send({ base, text, ...more });

describe('a brief', () => {
  it('begins with the words that the figures suggest, and speaks of the likeliest option', () => {
    expect(brief).toMatchObject({ version: 1, latest: 1, comparisonMoved: false });
    expect(brief.text).toEqual(brief.facts.suggested);
    expect(brief.text.title).toBe(`${site.name}: Mounds`);
    // Mounds closes in 2026 in all of four futures, of which two meet a drought that year: not sooner than it.
    expect(
      brief.facts.outlooks[0].options.map(({ recovery, drought, neither }) => [recovery, drought, neither]),
    ).toEqual([
      [1, 2, 1],
      [2, 2, 0],
    ]);
    expect(brief.text.parts.find(({ part }) => part === 'answer')?.words).toMatch(
      /^In 50 of 100 futures “Mounds” closes the ground before the next drought \(15 to 85\)\. Waiting does so in 25/,
    );
    expect(brief.facts.options.map(({ mapFutures }) => mapFutures)).toEqual([4, 4]);
  });

  it('keeps every version as it was, and refuses one that was written on an older one', async () => {
    const first = await pdfOf(1);
    const words = withWords(brief.text, 'question', 'Shall we build the mounds?');
    const moved = { ...words, title: 'Mounds, now', parts: [...words.parts].reverse() };
    const saved = (await save(1, moved).expect(200)).body as Brief;
    expect(saved).toMatchObject({ version: 2, latest: 2, text: moved });
    expect(saved.versions.map(({ version, title }) => [version, title])).toEqual([
      [2, 'Mounds, now'],
      [1, `${site.name}: Mounds`],
    ]);
    const refused = await save(1, brief.text).expect(409);
    expect((refused.body as Problem).detail).toMatch(/version 2/);
    const old = (await team.agents.trainer.get(pathOf('/versions/1')).expect(200)).body as Brief;
    expect(old).toMatchObject({ version: 1, latest: 2, text: brief.text });
    expect(await pdfOf(1)).toEqual(first);
    await team.agents.trainer.get(pathOf('/versions/9')).expect(404);
    await team.agents.trainer.get(pathOf('/versions/9/brief.pdf')).expect(404);
  });

  it('lets figures go on with the comparison only when asked, and words that nobody changed with them', async () => {
    await fillComparison(team.agents.modeller, comparison, 8);
    const now = (await team.agents.manager.get(pathOf()).expect(200)).body as Brief;
    expect(now.comparisonMoved).toBe(true);
    const kept = (await save(now.latest, now.text).expect(200)).body as Brief;
    expect(kept.facts.comparison.done).toBe(4);
    const anew = (await save(kept.latest, kept.text, { figures: 'anew' }).expect(200)).body as Brief;
    expect(anew.facts.comparison.done).toBe(8);
    expect(anew.comparisonMoved).toBe(false);
    const wordsOf = (part: string) => anew.text.parts.find((each) => each.part === part)?.words;
    expect(wordsOf('question')).toBe('Shall we build the mounds?');
    expect(wordsOf('sureness')).toMatch(/^8 futures/);
    expect(anew.text.title).toBe('Mounds, now');
  });

  it('names what its words have wrong', async () => {
    const { latest } = (await team.agents.manager.get(pathOf()).expect(200)).body as Brief;
    const hidden = {
      ...brief.text,
      parts: brief.text.parts.map((each) => (each.part === 'cautions' ? { ...each, shown: false } : each)),
    };
    const twice = { ...brief.text, parts: [brief.text.parts[1], ...brief.text.parts.slice(1)] };
    for (const [text, message] of [
      [{ ...brief.text, title: ' ' }, /Fill this in/],
      [withWords(brief.text, 'question', 'x'.repeat(3001)), /3000/],
      [hidden, /always printed/],
      [twice, /each part once/],
      [{ ...brief.text, parts: brief.text.parts.slice(1) }, /each of the 8 parts/],
    ] as const) {
      const refused = await save(latest, text as BriefText).expect(400);
      expect(JSON.stringify(refused.body)).toMatch(message);
    }
  });

  it('is copied, listed and deleted, and its files with it', async () => {
    const copy = (await team.agents.modeller.post(pathOf('/copies')).expect(200)).body as Brief;
    expect(copy).toMatchObject({ version: 1, text: { title: 'Mounds, now, copy' } });
    const list = await team.agents.trainer.get(`/api/sites/${site.id}/briefs`).expect(200);
    expect((list.body as { briefs: BriefSummary[] }).briefs.map(({ id }) => id)).toEqual([copy.id, brief.id]);
    const before = storedFiles(server).blobs.length;
    await team.agents.manager.delete(pathOf('', copy.id)).expect(204);
    // Its PDF goes; the maps stay, as the original has them too.
    expect(storedFiles(server).blobs).toHaveLength(before - 1);
    await team.agents.manager.get(pathOf('', copy.id)).expect(404);
    expect(storedFiles(server).arrivals).toEqual([]);
  });

  it('outlives its comparison, with what it printed', async () => {
    const other = await startTestComparison(team.agents.modeller, site);
    const made = await makeTestBrief(team.agents.manager, site, other);
    const printed = await pdfOf(1, made.id);
    await team.agents.modeller.delete(`/api/sites/${site.id}/comparisons/${other.id}`).expect(204);
    const now = (await team.agents.manager.get(pathOf('', made.id)).expect(200)).body as Brief;
    expect(now).toMatchObject({ comparisonId: null, facts: made.facts });
    expect(await pdfOf(1, made.id)).toEqual(printed);
    await team.agents.manager
      .post(pathOf('/versions', made.id))
      .send({ base: 1, text: made.text, figures: 'anew' })
      .expect(409);
  });

  it('needs two futures of every option, and a comparison of its own site', async () => {
    const empty = await startTestComparison(team.agents.modeller, site);
    const ask = (comparisonId: string) =>
      team.agents.manager.post(`/api/sites/${site.id}/briefs`).send({ comparisonId });
    expect(((await ask(empty.id).expect(409)).body as Problem).detail).toMatch(/Found 0 futures/);
    const elsewhere = await makeSite(team.agents.modeller, team.teamId);
    await team.agents.manager
      .post(`/api/sites/${elsewhere.id}/briefs`)
      .send({ comparisonId: comparison.id })
      .expect(404);
    await team.agents.manager.get(`/api/sites/${elsewhere.id}/briefs/${brief.id}`).expect(404);
  });
});

describe.skipIf(noPdfTools !== undefined)(
  `the PDF of a brief${noPdfTools ? ` (skipped: ${noPdfTools})` : ''}`,
  () => {
    it('says page and annex in text, numbered, with embedded fonts, tags, a title and a language', async () => {
      const pdf = await pdfOf(1);
      const [page, ...annex] = pdfText(pdf);
      expect(page).toContain(`${site.name}: Mounds`);
      expect(page).toContain('In 50 of 100 futures “Mounds” closes the ground before the next drought');
      expect(page).toContain('it is no permit, survey or engineering design');
      expect(page).toContain('Signature');
      expect(page).toContain(`1 of ${annex.length + 1}`);
      const rest = annex.join(' ');
      for (const title of [
        '1. Purpose and patterns',
        '2. Entities, state variables and scales',
        '3. Process overview and scheduling',
        '4. Design concepts',
        '5. Initialization',
        '6. Input data',
        '7. Submodels',
      ])
        expect(rest).toContain(title);
      expect(rest).toContain('seed “low tide”');
      expect(rest).toContain(site.layers[0].hash);
      expect(rest.replace(/\s/g, '')).toContain('0'.repeat(64));
      expect(pdfFacts(pdf)).toMatch(/Tagged:\s+yes/);
      expect(pdfFacts(pdf)).toMatch(new RegExp(`Title:\\s+${site.name}: Mounds`));
      for (const font of pdfFonts(pdf)) expect(font).toMatch(/ yes yes yes /);
      expect(pdfFonts(pdf).length).toBeGreaterThan(1);
      const structure = pdfFacts(pdf, '-struct-text');
      for (const kind of ['H1', 'H2', 'Figure', 'Table', 'TH', 'LBody'])
        expect(structure).toMatch(new RegExp(`\n +${kind}( |\n)`));
      expect(pdf.toString('latin1')).toContain('/Lang (en-GB)');
      expect(pdf.length).toBeLessThan(5e6);
    });

    it('draws its maps: the page has water, standing ground and dark years where the words end', async () => {
      const bare = await makeTestBrief(
        team.agents.manager,
        site,
        await startTestComparison(team.agents.modeller, site),
      );
      const dark = (pixels: Buffer) => pixels.subarray(20).filter((grey) => grey < 200).length;
      expect(dark(pdfPixels(await pdfOf(1), 1))).toBeGreaterThan(
        dark(pdfPixels(await pdfOf(1, bare.id), 1)) + 500,
      );
    });

    it('runs on to a second page rather than lose words, and says so', async () => {
      const { latest, text } = (await team.agents.manager.get(pathOf()).expect(200)).body as Brief;
      const long = Array.from({ length: 70 }, (_, i) => `Line ${i} of many.`).join('\n');
      const much = withWords(withWords(withWords(text, 'question', long), 'change', long), 'sureness', long);
      const saved = (await save(latest, much).expect(200)).body as Brief;
      expect(saved.versions[0].briefPages).toBeGreaterThan(1);
      const pages = pdfText(await pdfOf(saved.version));
      for (const part of [0, 69]) expect(pages.join(' ')).toContain(`Line ${part} of many.`);
      expect(pages.join(' ').match(/Line 69 of many\./g)).toHaveLength(3);
    });

    it('shows letters of other scripts', async () => {
      const { latest, text } = (await team.agents.manager.get(pathOf()).expect(200)).body as Brief;
      const saved = (
        await save(latest, withWords(text, 'question', 'Берег, ακτή, Łódź, 40 → 50 m²')).expect(200)
      ).body as Brief;
      expect(pdfText(await pdfOf(saved.version)).join(' ')).toContain('Берег, ακτή, Łódź, 40 → 50 m²');
    });
  },
);
