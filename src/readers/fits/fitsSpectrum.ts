import { ProblemError } from '../../problems/index.ts';
import { count, type Notes, newNotes, noteFact, warn } from '../notes.ts';
import type { ByteSource, Reading, ReadingChoices, ReadingControl } from '../reading.ts';
import type { Candidate, FitsFile, Judged } from './candidate.ts';
import { type Hdu, listHdus, nameHdu } from './hdus.ts';
import { judgeImage } from './imageCandidate.ts';
import { judgeTable } from './tableCandidate.ts';

/** Units whose merit is below this are never proposed on their own. */
const LEAST_MERIT = 5;

/** Reads a spectrum from a FITS file: the unit chosen, else the likeliest. @throws ProblemError */
export async function fitsSpectrum(source: ByteSource, choices: ReadingChoices, control: ReadingControl): Promise<Reading> {
  const notes = newNotes(source.name);
  const hdus = await listHdus(source, notes);
  const file: FitsFile = { source, hdus, notes };
  if (hdus.length === 0)
    throw new ProblemError({ code: 'not-fits', where: { file: source.name }, found: 'no header', expected: 'a FITS file' });
  noteFact(notes, 'format', `FITS, ${count(hdus.length, 'unit')}`, 'the file starts with SIMPLE');

  const { judged, candidates } = await judgeAll(file, choices);
  const best = candidates.toSorted((a, b) => b.merit - a.merit || a.hdu.index - b.hdu.index).find((c) => c.merit >= LEAST_MERIT);
  const chosen = choices.hdu === undefined ? best : candidates.find((c) => c.hdu.index === choices.hdu);
  if (!chosen) throw choices.hdu === undefined ? noSpectrum(hdus, judged, notes) : notThere(hdus, judged, choices.hdu, notes);
  noteFact(notes, 'unit', chosen.label, choices.hdu === undefined ? chosen.reason : 'chosen by you');
  const rivals = candidates.filter((c) => c !== chosen && c.merit >= LEAST_MERIT);
  for (const rival of rivals) notes.offers.push({ label: rival.label, choices: { hdu: rival.hdu.index } });
  const equals = rivals.filter((c) => c.merit >= chosen.merit - 5);
  if (equals.length && choices.hdu === undefined) {
    warn(notes, 'several-spectra', `the file holds ${equals.length + 1} spectra; ${nameHdu(chosen.hdu)} is shown`, {
      doThis: 'Choose another unit if you want another.',
    });
  }
  return chosen.read(choices, control);
}

/** Judges every unit; a damaged one is no candidate but does not spoil the others. */
async function judgeAll(
  file: FitsFile,
  choices: ReadingChoices,
): Promise<{ judged: Map<Hdu, Judged | ProblemError>; candidates: Candidate[] }> {
  const judged = new Map<Hdu, Judged | ProblemError>();
  const candidates: Candidate[] = [];
  for (const hdu of file.hdus) {
    // what is remarked on while judging concerns only the unit that is shown
    const aside: FitsFile = hdu.index === choices.hdu ? file : { ...file, notes: { ...file.notes, remarks: [] } };
    const verdict = await judge(aside, hdu);
    judged.set(hdu, verdict);
    if (!(verdict instanceof ProblemError) && 'candidate' in verdict) {
      const { candidate } = verdict;
      candidates.push({
        ...candidate,
        read: (c, control) => {
          if (aside !== file) aside.notes.remarks.unshift(...file.notes.remarks);
          return candidate.read(c, control);
        },
      });
    }
  }
  return { judged, candidates };
}

async function judge(file: FitsFile, hdu: Hdu): Promise<Judged | ProblemError> {
  try {
    if (hdu.kind === 'image') return await judgeImage(file, hdu);
    if (hdu.kind === 'binary table' || hdu.kind === 'ASCII table') return await judgeTable(file, hdu);
    if (hdu.header.cards.get('ZIMAGE')?.value === true)
      return { whyNot: 'it is an image packed in tiles: unpack the file (funpack) first' };
    return { whyNot: 'it is neither an image nor a table' };
  } catch (error) {
    if (error instanceof ProblemError) return error;
    throw error;
  }
}

function noSpectrum(hdus: readonly Hdu[], judged: ReadonlyMap<Hdu, Judged | ProblemError>, notes: Notes): ProblemError {
  const broken = [...judged.values()].find((v) => v instanceof ProblemError);
  if (broken && hdus.filter((h) => h.axes.length > 0).length === 1) return broken;
  const reasons = hdus.map((h) => `${nameHdu(h)}: ${reasonOf(judged.get(h))}`);
  return new ProblemError({
    code: 'no-spectrum',
    where: { file: notes.file },
    found: `no wavelengths in the file (${reasons.slice(0, 6).join('; ')}${reasons.length > 6 ? '; ...' : ''})`,
    expected: 'an image with a wavelength axis, or a table with columns of wavelength and flux',
    doThis: 'Give the spectrum a wavelength calibration, or choose the unit that holds it.',
  });
}

const reasonOf = (verdict: Judged | ProblemError | undefined) =>
  verdict instanceof ProblemError ? verdict.problem.found : verdict && 'whyNot' in verdict ? verdict.whyNot : 'no spectrum';

function notThere(hdus: readonly Hdu[], judged: ReadonlyMap<Hdu, Judged | ProblemError>, index: number, notes: Notes): ProblemError {
  const hdu = hdus.find((h) => h.index === index);
  const verdict = hdu && judged.get(hdu);
  if (verdict instanceof ProblemError) return verdict;
  return new ProblemError({
    code: hdu ? 'no-spectrum' : 'no-such-hdu',
    where: { file: notes.file, hdu: index },
    found: hdu ? reasonOf(verdict) : `no HDU ${index}`,
    expected: hdu ? 'a spectrum' : `HDU 0 to ${hdus.length - 1}`,
    doThis: 'Choose another unit of the file.',
  });
}
