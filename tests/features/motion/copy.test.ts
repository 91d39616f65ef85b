/** The answer as text. The two-link circuit's figures follow by hand: 4°/Myr links about one pole add their angles. */
import { describe, expect, it } from 'vitest';
import { answerAt } from '../../../src/features/motion/notebook/answer';
import { copyText } from '../../../src/features/motion/notebook/copy';
import { compileModel, fromMatrix, fromPole, type Quaternion } from '../../../src/kernel';
import { block, frame, row, turnBetween } from '../../kernel/support';

const model = compileModel(
  [block('avon'), block('brant'), frame('spin')],
  [
    row(['avon', 'brant', 10, 90, 0, 40], { source: 'Pell 2019' }),
    row(['brant', 'spin', 10, 90, 0, 20], { source: 'Voss 2020', evidence: 'posed' }),
  ],
);
const point = { block: 'avon', lat: 0, lon: 0, subject: 'Avon', plural: false } as never;
const nameOf = (code: string) => code.charAt(0).toUpperCase() + code.slice(1);
const answer = answerAt(model, point, 5, 'spin', nameOf);
if (!answer.placed) throw new Error('not placed');
const copied = { point, answer, age: 5, heldStill: 'spin', from: 'Two blocks, v1', nameOf };

describe('the answer', () => {
  it('says where the point would be without each link, and how far along each is between its rows', () => {
    expect(answer.lon).toBeCloseTo(30, 9);
    const [first, second] = answer.rows;
    expect(first).toMatchObject({ block: 'avon', fraction: 0.5 });
    expect(first!.withoutIt.lon).toBeCloseTo(10, 9);
    expect(first!.withoutIt.km).toBeCloseTo((20 * 6371.0088 * Math.PI) / 180, 6);
    expect(second!.withoutIt.lon).toBeCloseTo(20, 9);
  });

  it('is a sentence with its circuit, its sources and where it is from', () => {
    expect(copyText('sentence', copied).replace(/\s/gu, ' ')).toBe(
      'At 5.0 Ma Avon lies at 0.0° N, 30.0° E, how surely is not known, with Spin held still. Through Avon in Brant, Brant in Spin (Pell 2019; Voss 2020). Two blocks, v1.',
    );
  });

  it('is a table of its links', () => {
    const [head, first, second] = copyText('table', copied).split('\n').map((line) => line.split('\t'));
    const cells = (line: string[] | undefined) => Object.fromEntries(head!.map((name, i) => [name, line![i]]));
    expect(cells(first)).toMatchObject({ rotation: 'Avon in Brant', angle_deg: '20', fraction: '0.5', source: 'Pell 2019' });
    expect(cells(second)).toMatchObject({ evidence: 'posed', younger_ma: '0.0', older_ma: '10.0' });
  });

  it('is a matrix and a quaternion of the one rotation', () => {
    const numbers = (what: 'matrix' | 'quaternion') =>
      copyText(what, copied).split('\n').slice(1).flatMap((line) => line.split('\t').map(Number));
    const quaternion = numbers('quaternion') as unknown as Quaternion;
    const matrix = numbers('matrix') as unknown as Parameters<typeof fromMatrix>[0];
    expect(turnBetween(quaternion, fromPole(90, 0, 30))).toBeLessThan(1e-14);
    expect(turnBetween(fromMatrix(matrix), fromPole(90, 0, 30))).toBeLessThan(1e-14);
    expect(copyText('matrix', copied)).toMatch(/^# avon relative to spin at 5 Ma/);
  });
}); // prettier-ignore
