import fc from 'fast-check';
import reference from 'jstat';
import { describe, expect, it } from 'vitest';
import {
  cap95ToCovariance,
  checkCovariance,
  CHI_SQUARE_2_95,
  compileModel,
  confidenceRule,
  type Covariance,
  covarianceToCap95,
  covarianceToPublishedForm,
  EARTH_RADIUS_KM,
  eigenvalues,
  F_QUANTILE_ERROR,
  fQuantile,
  incompleteBeta,
  isUnknown,
  latitudeBand,
  pointEllipse,
  poseAt,
  poseUncertainty,
  publishedFormToCovariance,
  rotate,
  shares,
  toLatLon,
  toRadians,
  toVector,
} from '../../../src/kernel';
import { block, covariance, frame, place, placed, row } from '../support';

const one = (c: Covariance | null, rest = {}) => {
  const model = compileModel(
    [block('avon'), frame('spin')],
    [row(['avon', 'spin', 10, 25, 40, 33], { covariance: c, ...rest })],
  );
  const pose = placed(poseAt(model, 'avon', 10, 'spin'));
  return { pose, uncertainty: poseUncertainty(model, pose) };
};

/** jstat stops its search at 1e-8 of the beta quantile. */
const JSTAT_ERROR = 2e-5;

describe('quantiles', () => {
  it('of F agree with jstat, for one to ten degrees above and real ones below', () => {
    for (const above of [1, 2, 3, 4, 7, 10]) {
      for (const below of [1, 2.5, 3, 8, 14.7, 60, 250]) {
        for (const p of [0.5, 0.9, 0.95, 0.99]) {
          const theirs = reference.centralF.inv(p, above, below);
          expect(
            Math.abs(fQuantile(p, above, below) / theirs - 1),
            `F(${p}; ${above}, ${below})`,
          ).toBeLessThan(JSTAT_ERROR);
        }
      }
    }
  });
  it('of F invert the incomplete beta function, to F_QUANTILE_ERROR', () => {
    fc.assert(
      fc.property(
        fc.constantFrom(1, 2, 3, 6),
        fc.double({ min: 1, max: 1000, noNaN: true }),
        fc.double({ min: 0.5, max: 0.999, noNaN: true }),
        (above, below, p) => {
          const f = fQuantile(p, above, below);
          const at = (x: number) => incompleteBeta(above / 2, below / 2, (above * x) / (above * x + below));
          expect(at(f * (1 - F_QUANTILE_ERROR))).toBeLessThan(p + 1e-13);
          expect(at(f * (1 + F_QUANTILE_ERROR))).toBeGreaterThan(p - 1e-13);
        },
      ),
    );
  });

  it('of F approach χ² as their lower degrees grow', () => {
    for (const n of [1, 2, 3] as const) {
      const chi = confidenceRule(n, [{ trace: 1, dof: null }]).quantile;
      expect(Math.abs(chi - reference.chisquare.inv(0.95, n))).toBeLessThan(1e-6);
      expect(Math.abs(n * fQuantile(0.95, n, 1e6) - chi)).toBeLessThan(5e-5);
    }
    expect(CHI_SQUARE_2_95).toBeCloseTo(5.991464547107979, 14);
  });

  it('refuse what is no probability and no count', () => {
    expect(() => fQuantile(1, 2, 3)).toThrow(/p 1/);
    expect(() => fQuantile(0.95, 2, 0)).toThrow(/degrees of freedom 2, 0/);
    expect([incompleteBeta(2, 3, 0), incompleteBeta(2, 3, 1)]).toEqual([0, 1]);
    expect(Math.abs(incompleteBeta(1.5, 4.2, 0.3) - reference.beta.cdf(0.3, 1.5, 4.2))).toBeLessThan(1e-9);
  });
});

describe('the rule of a region', () => {
  it('is χ² where every scale is known, else F with degrees by Satterthwaite', () => {
    expect(
      confidenceRule(2, [
        { trace: 3, dof: null },
        { trace: 0, dof: 9 },
      ]),
    ).toMatchObject({ name: 'chi-square', dof: null });
    expect(confidenceRule(2, [{ trace: 3, dof: 11 }])).toMatchObject({ name: 'F', dof: 11, dimensions: 2 });
    expect(
      confidenceRule(3, [
        { trace: 3, dof: 11 },
        { trace: 1, dof: 4 },
      ]).dof,
    ).toBeCloseTo(16 / (9 / 11 + 1 / 4), 12);
    expect(
      confidenceRule(2, [
        { trace: 3, dof: 10 },
        { trace: 3, dof: null },
      ]).dof,
    ).toBeCloseTo(40, 12);
    expect(confidenceRule(2, [{ trace: 1, dof: 11 }]).quantile).toBeCloseTo(11 * (0.05 ** (-2 / 11) - 1), 12);
  });
});

describe('ellipses of places', () => {
  it('of an isotropic covariance are circles of the cap’s radius, wherever the place', () => {
    fc.assert(
      fc.property(place, fc.double({ min: 0.1, max: 5, noNaN: true }), (p, cap) => {
        const { pose, uncertainty } = one(cap95ToCovariance(cap));
        const ellipse = pointEllipse(pose, uncertainty, p);
        const km = toRadians(cap) * EARTH_RADIUS_KM;
        expect(Math.abs((ellipse?.semi_major_km ?? NaN) - km)).toBeLessThan(1e-6);
        expect(Math.abs((ellipse?.semi_minor_km ?? NaN) - km)).toBeLessThan(1e-6);
      }),
    );
  });

  it('lie along the motion that is uncertain: turning about 90° N moves places east', () => {
    const model = compileModel(
      [block('avon'), frame('spin')],
      [row(['avon', 'spin', 10, 90, 0, 33], { covariance: [0, 0, 0, 0, 0, 1e-4] })],
    );
    const pose = placed(poseAt(model, 'avon', 10, 'spin'));
    const ellipse = pointEllipse(pose, poseUncertainty(model, pose), toVector(30, 50));
    expect(ellipse?.azimuth_deg).toBeCloseTo(90, 10);
    expect(ellipse?.semi_minor_km).toBeCloseTo(0, 6);
    expect(ellipse?.semi_major_km).toBeCloseTo(
      Math.sqrt(CHI_SQUARE_2_95) * 0.01 * Math.cos(toRadians(30)) * EARTH_RADIUS_KM,
      6,
    );
  });

  it('have azimuths clockwise from north: an axis to the north-east', () => {
    const c: Covariance = [0, 0, 0, 1e-4, -1e-4, 1e-4];
    const model = compileModel(
      [block('avon'), frame('spin')],
      [row(['avon', 'spin', 10, 90, 0, 0], { covariance: c })],
    );
    const pose = placed(poseAt(model, 'avon', 10, 'spin'));
    const ellipse = pointEllipse(pose, poseUncertainty(model, pose), toVector(0, 0));
    expect(ellipse?.azimuth_deg).toBeCloseTo(45, 10);
    const mirrored = compileModel(
      [block('avon'), frame('spin')],
      [row(['avon', 'spin', 10, 90, 0, 0], { covariance: [0, 0, 0, 1e-4, 1e-4, 1e-4] })],
    );
    const other = placed(poseAt(mirrored, 'avon', 10, 'spin'));
    expect(pointEllipse(other, poseUncertainty(mirrored, other), toVector(0, 0))?.azimuth_deg).toBeCloseTo(
      135,
      10,
    );
  });

  it('hold the axes of the covariance: no direction reaches beyond them', () => {
    fc.assert(
      fc.property(covariance, place, (c, p) => {
        const { pose, uncertainty } = one(c);
        const ellipse = pointEllipse(pose, uncertainty, p);
        const [least, , greatest] = eigenvalues(c);
        const reach = (variance: number) => EARTH_RADIUS_KM * Math.sqrt(CHI_SQUARE_2_95 * variance);
        expect(ellipse?.semi_major_km).toBeLessThanOrEqual(reach(greatest) * (1 + 1e-9));
        expect(ellipse?.semi_minor_km).toBeGreaterThanOrEqual(reach(Math.max(0, least)) * (1 - 1e-6));
        expect((ellipse?.azimuth_deg ?? NaN) >= 0 && (ellipse?.azimuth_deg ?? NaN) < 180).toBe(true);
      }),
    );
  });

  it('are wider where κ̂ was estimated, and say by which rule', () => {
    const c: Covariance = [1e-4, 0, 0, 1e-4, 0, 1e-4];
    const known = pointEllipse(one(c).pose, one(c).uncertainty, toVector(1, 2));
    const estimated = one(c, { cov_dof: 6 });
    const wider = pointEllipse(estimated.pose, estimated.uncertainty, toVector(1, 2));
    expect(known?.rule.name).toBe('chi-square');
    expect(wider?.rule).toMatchObject({ name: 'F', dof: 6 });
    expect((wider?.semi_major_km ?? NaN) / (known?.semi_major_km ?? NaN)).toBeCloseTo(
      Math.sqrt((6 * (0.05 ** (-2 / 6) - 1)) / CHI_SQUARE_2_95),
      10,
    );
  });

  it('are none where no row carries a covariance', () => {
    const { pose, uncertainty } = one(null);
    expect(isUnknown(uncertainty)).toBe(true);
    expect(pointEllipse(pose, uncertainty, toVector(1, 2))).toBeNull();
    expect(latitudeBand(pose, uncertainty, toVector(1, 2))).toBeNull();
  });
});

describe('latitude bands', () => {
  it('are 1.96 σ to either side of the latitude, kept within the poles', () => {
    const { pose, uncertainty } = one(cap95ToCovariance(2));
    const band = latitudeBand(pose, uncertainty, toVector(12, 80));
    const { lat } = toLatLon(rotate(pose.quaternion, toVector(12, 80)));
    const half = (1.959963984540054 * 2) / Math.sqrt(CHI_SQUARE_2_95);
    expect(Math.abs((band?.lat ?? NaN) - lat)).toBeLessThan(1e-12);
    expect(Math.abs((band?.upper ?? NaN) - lat - half)).toBeLessThan(1e-9);
    expect(Math.abs((band?.lower ?? NaN) - lat + half)).toBeLessThan(1e-9);
    const wide = one(cap95ToCovariance(80));
    expect(latitudeBand(wide.pose, wide.uncertainty, toVector(12, 80))).toMatchObject({ upper: 90 });
  });
});

describe('shares', () => {
  it('add up to 1 by row and by link, in proportion to the variances', () => {
    const c = (s: number): Covariance => [s, 0, 0, s, 0, s];
    const rotations = [
      row(['avon', 'spin', 20, 10, 20, 15], { covariance: c(1e-4) }),
      row(['brant', 'avon', 20, 60, 20, 25], { covariance: c(3e-4) }),
      row(['brant', 'avon', 40, 60, 25, 45]),
    ];
    const model = compileModel([block('avon'), block('brant'), frame('spin')], rotations);
    const pose = placed(poseAt(model, 'brant', 20, 'spin'));
    const got = shares(pose, poseUncertainty(model, pose), toVector(-20, 33));
    expect(pose.links.map(({ block: b }) => b)).toEqual(['brant', 'avon']);
    got.links.forEach((share, i) => expect(Math.abs(share - ([0.75, 0.25][i] ?? NaN))).toBeLessThan(1e-12));
    expect(got.rows.reduce((sum, { share }) => sum + share, 0)).toBeCloseTo(1, 14);
    expect(new Map(got.rows.map(({ row: { id }, link }) => [id, link]))).toEqual(
      new Map([
        [rotations[0]?.id, 1],
        [rotations[1]?.id, 0],
      ]),
    );
  });

  it('are all 0 where nothing is known', () => {
    const { pose, uncertainty } = one(null);
    expect(shares(pose, uncertainty, toVector(1, 2))).toMatchObject({ links: [0], rows: [{ share: 0 }] });
  });
});

describe('forms of a covariance', () => {
  it('as published: (1/κ̂)[a b c; b d e; c e f] × 10^−g', () => {
    const c = publishedFormToCovariance({ kappa: 2, a: 3.1, b: -1.2, c: 0.4, d: 5, e: 0.7, f: 2.2, g: 7 });
    [1.55e-7, -0.6e-7, 0.2e-7, 2.5e-7, 0.35e-7, 1.1e-7].forEach((x, k) =>
      expect(Math.abs((c[k] ?? NaN) - x)).toBeLessThan(1e-21),
    );
    expect(() => publishedFormToCovariance({ kappa: 0, a: 1, b: 0, c: 0, d: 1, e: 0, f: 1, g: 7 })).toThrow(
      /kappa 0/,
    );
  });

  it('go there and back', () => {
    fc.assert(
      fc.property(covariance, fc.double({ min: 0.01, max: 100, noNaN: true }), (c, kappa) => {
        const form = covarianceToPublishedForm(c, kappa);
        const most = Math.max(...[form.a, form.b, form.c, form.d, form.e, form.f].map(Math.abs));
        expect(most >= 0.999999 && most < 10.00001).toBe(true);
        publishedFormToCovariance(form).forEach((x, k) =>
          expect(Math.abs(x - (c[k] ?? NaN))).toBeLessThan(1e-12 * c[0] + 1e-18),
        );
      }),
    );
    expect(covarianceToPublishedForm([0, 0, 0, 0, 0, 0])).toMatchObject({ g: 0, a: 0 });
    expect(Math.abs(covarianceToCap95(cap95ToCovariance(3.7)) - 3.7)).toBeLessThan(1e-13);
    expect(() => cap95ToCovariance(-1)).toThrow(/cap95_deg -1/);
  });

  it('are checked: finite, symmetric, no negative variance in any direction', () => {
    fc.assert(fc.property(covariance, (c) => checkCovariance(c) === null));
    expect(checkCovariance([1, 0, 0, NaN, 0, 1])).toMatchObject({ problem: 'not finite' });
    expect(checkCovariance([1, 2, 3, 0, 1, 2, 3, 2, 1])).toMatchObject({ problem: 'not symmetric' });
    expect(checkCovariance([1, 2, 0, 1, 0, 1])).toMatchObject({
      problem: 'not positive semi-definite',
      least_eigenvalue: expect.closeTo(-1, 12) as number,
    });
    expect(checkCovariance([1, 1, 1, 1, 1, 1])).toBeNull();
    expect(checkCovariance([0, 0, 0, 0, 0, 0])).toBeNull();
    expect(checkCovariance([2, 1, 0, 1, 2, 0, 0, 0, 1])).toBeNull();
  });

  it('have eigenvalues whose sums and products are those of the matrix', () => {
    fc.assert(
      fc.property(covariance, ([xx, xy, xz, yy, yz, zz]) => {
        const [a, b, c] = eigenvalues([xx, xy, xz, yy, yz, zz]);
        expect(a <= b + 1e-18 && b <= c + 1e-18).toBe(true);
        expect(Math.abs(a + b + c - (xx + yy + zz))).toBeLessThan(1e-14);
        const determinant = xx * (yy * zz - yz * yz) - xy * (xy * zz - yz * xz) + xz * (xy * yz - yy * xz);
        expect(Math.abs(a * b * c - determinant)).toBeLessThan(1e-12 * c ** 3 + 1e-25);
      }),
    );
    expect(eigenvalues([4, 0, 0, -1, 0, 2])).toEqual([
      expect.closeTo(-1, 14),
      expect.closeTo(2, 14),
      expect.closeTo(4, 14),
    ]);
  });
});
