import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { isAbsence } from '../src/stats/absence.ts';
import { binomialTails } from '../src/stats/binomial.ts';
import { matchesOfCounts } from '../src/stats/crude-ratio.ts';
import { exactOddsRatio } from '../src/stats/exact-odds-ratio.ts';
import { fisherExact } from '../src/stats/fisher-exact.ts';
import { heterogeneityOfQ, heterogeneityOfRange } from '../src/stats/heterogeneity.ts';
import { interactionOf, interactionOfRanges } from '../src/stats/interaction.ts';
import { oddsRatio } from '../src/stats/odds-ratio.ts';
import {
  reservationsAbout, riskFromOdds, riskRatiosAtBaseline, riskRatiosAtPrevalence,
} from '../src/stats/odds-to-risk.ts';
import { pOfStatistic } from '../src/stats/p-of-statistic.ts';
import { partsAndTotal } from '../src/stats/parts-and-total.ts';
import { countsBehindPercent, percentOfCount } from '../src/stats/percent-of-count.ts';
import { clopperPearsonInterval, wilsonInterval } from '../src/stats/proportion-interval.ts';
import { includes } from '../src/stats/ranges.ts';
import { ratiosOfRisks } from '../src/stats/ratios-of-risks.ts';
import { riskFromHazard } from '../src/stats/hazard-to-risk.ts';
import { studentP } from '../src/stats/student-t.ts';
import type { TwoByTwo } from '../src/stats/two-by-two.ts';
import { given } from './records.ts';

const cell = fc.integer({ min: 1, max: 120 });
const share = fc.double({ min: 0.01, max: 0.99, noNaN: true });
const inside = fc.double({ min: 0, max: 1, noNaN: true });

function tableOf(a: number, b: number, c: number, d: number): TwoByTwo {
  return { exposedEvents: a, exposedNonEvents: b, unexposedEvents: c, unexposedNonEvents: d };
}

/** Whether a value is in a range, but for a few units of the last place at its ends. */
function holds({ low, high }: { low: number; high: number }, value: number): boolean {
  const room = 1e-12 * Math.abs(value);
  return includes({ low: low - room, high: high + room }, value);
}

/** A value a share of the way through a range. */
function within({ low, high }: { low: number; high: number }, at: number): number {
  return low + at * (high - low);
}

describe('a 2×2 table', () => {
  it('with its groups turned round has reciprocal odds ratio and limits, and the same p', () => {
    fc.assert(fc.property(cell, cell, cell, cell, (a, b, c, d) => {
      const [one, other] = [tableOf(a, b, c, d), tableOf(c, d, a, b)];
      expect(given(oddsRatio(one)).ratio * given(oddsRatio(other)).ratio).toBeCloseTo(1, 10);
      const [exact, turned] = [given(exactOddsRatio(one)), given(exactOddsRatio(other))];
      expect(exact.exact.low * turned.exact.high).toBeCloseTo(1, 8);
      expect(exact.midP.high * turned.midP.low).toBeCloseTo(1, 8);
      const [p, q] = [given(fisherExact(one)), given(fisherExact(other))];
      expect(p.twoSided).toBeCloseTo(q.twoSided, 10);
      expect(p.greater).toBeCloseTo(q.less, 10);
    }), { numRuns: 60 });
  });

  it('excludes 1 from its exact interval just where the exact one-sided p is below 0.025', () => {
    fc.assert(fc.property(cell, cell, cell, cell, (a, b, c, d) => {
      const { exact, midP, conditional } = given(exactOddsRatio(tableOf(a, b, c, d)));
      const { greater, less } = given(fisherExact(tableOf(a, b, c, d)));
      if (Math.abs(greater - 0.025) > 1e-9) expect(exact.low > 1).toBe(greater < 0.025);
      if (Math.abs(less - 0.025) > 1e-9) expect(exact.high < 1).toBe(less < 0.025);
      expect(exact.low <= midP.low && midP.low <= conditional).toBe(true);
      expect(conditional <= midP.high && midP.high <= exact.high).toBe(true);
    }), { numRuns: 60 });
  });

  it('gives back its own crude ratio however it is rounded', () => {
    const decimals = fc.integer({ min: 1, max: 4 });
    fc.assert(fc.property(cell, cell, cell, cell, decimals, (a, b, c, d, places) => {
      const { ratio, interval } = given(oddsRatio(tableOf(a, b, c, d)));
      const print = (value: number): { value: number; decimals: number } =>
        ({ value: Math.round(value * 10 ** places) / 10 ** places, decimals: places });
      const printed = {
        estimate: print(ratio), lower: print(interval.low), upper: print(interval.high),
      };
      const [wald] = matchesOfCounts('OR', tableOf(a, b, c, d), printed);
      expect(wald).toMatchObject({ estimate: true, lower: true, upper: true });
    }));
  });
});

describe('intervals of a proportion', () => {
  it('of Clopper and Pearson leave 2.5% in each tail, and hold Wilson’s centre', () => {
    fc.assert(fc.property(fc.integer({ min: 1, max: 400 }), fc.integer({ min: 2, max: 400 }),
      (one, other) => {
        const [events, total] = [Math.min(one, other - 1), other];
        const { low, high } = given(clopperPearsonInterval(events, total));
        expect(given(binomialTails(events, total, low)).atLeast).toBeCloseTo(0.025, 10);
        expect(given(binomialTails(events, total, high)).atMost).toBeCloseTo(0.025, 10);
        const wilson = given(wilsonInterval(events, total));
        expect(includes({ low, high }, (wilson.low + wilson.high) / 2)).toBe(true);
      }));
  });
});

describe('a printed percentage', () => {
  it('agrees with its count however halves are rounded, and is cut off at worst', () => {
    fc.assert(fc.property(
      fc.integer({ min: 1, max: 3000 }), inside, fc.integer({ min: 0, max: 3 }),
      (total, at, decimals) => {
        const count = Math.round(at * total);
        const scale = 10 ** decimals;
        const units = (100 * count * scale) / total;
        for (const digits of [Math.round(units), Math.ceil(units - 0.5)]) {
          const printed = { value: digits / scale, decimals };
          expect(given(percentOfCount(count, total, printed)).verdict).toBe('agrees');
          expect(includes(given(countsBehindPercent(printed, total)), count)).toBe(true);
        }
        const cut = { value: Math.floor(units + 1e-9) / scale, decimals };
        expect(given(percentOfCount(count, total, cut)).verdict).not.toBe('differs');
      },
    ));
  });
});

describe('parts', () => {
  it('that were rounded after being added are never off by more than rounding', () => {
    const part = fc.double({ min: 0, max: 1000, noNaN: true });
    fc.assert(fc.property(fc.array(part, { minLength: 1, maxLength: 12 }),
      fc.integer({ min: 0, max: 3 }), (parts, decimals) => {
        const round = (value: number): { value: number; decimals: number } =>
          ({ value: Math.round(value * 10 ** decimals) / 10 ** decimals, decimals });
        const total = round(parts.reduce((so, value) => so + value, 0));
        const { verdict } = given(partsAndTotal(parts.map(round), total));
        expect(['adds up', 'off by rounding']).toContain(verdict);
      }));
  });
});

describe('ranges', () => {
  const wide = fc.tuple(fc.double({ min: 0.1, max: 8, noNaN: true }), inside)
    .map(([low, more]) => ({ low, high: low * (1 + more) }));
  const risks = fc.tuple(share, inside)
    .map(([low, more]) => ({ low, high: low + more * (0.995 - low) }));

  it('of an odds ratio and a risk hold the risk ratio of every pair in them', () => {
    fc.assert(fc.property(wide, risks, inside, inside, (ratios, baseline, one, other) => {
      const found = given(riskRatiosAtBaseline(ratios, baseline));
      const { riskRatio } = given(riskFromOdds(within(ratios, one), within(baseline, other)));
      expect(holds(found, riskRatio)).toBe(true);
    }));
  });

  it('at the share of everybody hold the risk ratio whatever share is exposed', () => {
    fc.assert(fc.property(fc.double({ min: 0.1, max: 10, noNaN: true }), share, share,
      (ratio, baseline, exposedShare) => {
        const { riskRatio, exposedRisk } = given(riskFromOdds(ratio, baseline));
        const everybody = exposedShare * exposedRisk + (1 - exposedShare) * baseline;
        const point = { low: everybody, high: everybody };
        expect(holds(given(riskRatiosAtPrevalence({ low: ratio, high: ratio }, point)), riskRatio))
          .toBe(true);
      }));
  });

  it('of two estimates hold the interaction of every pair in them', () => {
    const spread = fc.double({ min: -0.3, max: 0.3, noNaN: true });
    fc.assert(fc.property(spread, spread, wide, wide, inside, inside, (a, b, s1, s2, at, to) => {
      const one = { logEstimate: { low: a, high: a + 0.1 }, standardError: s1 };
      const other = { logEstimate: { low: b, high: b + 0.1 }, standardError: s2 };
      const ranges = given(interactionOfRanges(one, other));
      const point = given(interactionOf(
        { logRatio: within(one.logEstimate, at), standardError: within(s1, to) },
        { logRatio: within(other.logEstimate, to), standardError: within(s2, at) },
      ));
      expect(holds(ranges.ratio, point.ratio)).toBe(true);
      expect(holds(ranges.p, point.log.p)).toBe(true);
    }));
  });

  it('of a statistic hold the p of every value in them, signs and all', () => {
    fc.assert(fc.property(fc.double({ min: -4, max: 4, noNaN: true }), inside, inside,
      fc.integer({ min: 1, max: 300 }), (low, more, at, df) => {
        const range = { low, high: low + more };
        const p = given(studentP(within(range, at), df));
        expect(holds(given(pOfStatistic('t', range, [df])), p)).toBe(true);
      }));
    expect(given(pOfStatistic('F', { low: 20, high: Infinity }, [1, 30])).low).toBe(0);
    expect(isAbsence(pOfStatistic('F', { low: 1, high: 2 }, [3]))).toBe(true);
  });

  it('of two risks hold the measures of every pair in them', () => {
    fc.assert(fc.property(risks, risks, inside, inside, (one, other, at, to) => {
      const found = given(ratiosOfRisks(one, other));
      const [exposed, unexposed] = [within(one, at), within(other, to)];
      expect(holds(found.riskRatio, exposed / unexposed)).toBe(true);
      expect(holds(found.oddsRatio, (exposed / (1 - exposed)) / (unexposed / (1 - unexposed))))
        .toBe(true);
    }));
  });

  it('of Q hold I² of every value in them', () => {
    fc.assert(fc.property(wide, inside, fc.integer({ min: 2, max: 30 }), (q, at, studies) => {
      const tenfold = { low: 10 * q.low, high: 10 * q.high };
      const found = given(heterogeneityOfRange(tenfold, studies));
      const point = given(heterogeneityOfQ(within(tenfold, at), studies));
      expect(holds(found.iSquared, point.iSquared) && holds(found.p, point.p)).toBe(true);
    }));
  });
});

describe('odds, hazards and risks', () => {
  it('stand in their order from 1 under proportional hazards', () => {
    fc.assert(fc.property(fc.double({ min: 1.01, max: 12, noNaN: true }), share, (ratio, risk) => {
      const { riskRatio, oddsRatio: odds } = given(riskFromHazard(ratio, risk));
      expect(1 < riskRatio && riskRatio < ratio && ratio < odds).toBe(true);
      const lower = given(riskFromHazard(1 / ratio, risk));
      expect(lower.oddsRatio < 1 / ratio && 1 / ratio < lower.riskRatio).toBe(true);
      expect(lower.riskRatio).toBeLessThan(1);
    }));
  });

  it('carry reservations: an adjusted ratio more than a crude one', () => {
    const kinds = (adjusted: boolean, withLimits: boolean): string[] =>
      reservationsAbout({ adjusted, withLimits }).map(({ kind }) => kind);
    expect(kinds(false, true)).toEqual(['baseline', 'design']);
    expect(kinds(true, false)).toEqual(['adjusted', 'baseline', 'design']);
    expect(kinds(true, true)).toEqual(['adjusted', 'limits', 'baseline', 'design']);
  });
});
