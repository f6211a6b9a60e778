import { describe, expect, it } from "vitest";
import { ConvergenceError, DomainError } from "@/analytics/errors";
import { fitLeastSquares } from "@/analytics/numerics/least-squares";

const everywhere = { lowest: [-1e3, -1e3], highest: [1e3, 1e3] };

describe("fitLeastSquares", () => {
  it("finds the certified answer of Misra1a, NIST Statistical Reference Datasets", () => {
    // data and certified values from memory: b1 = 238.94212918, b2 = 5.5015643181e-4, sum of squares 0.12455138894
    const volume = [
      10.07, 14.73, 17.94, 23.93, 29.61, 35.18, 40.02, 44.82, 50.76, 55.05, 61.01, 66.4, 75.47,
      81.78,
    ];
    const pressure = [
      77.6, 114.9, 141.1, 190.8, 239.9, 289, 332.8, 378.4, 434.8, 477.3, 536.8, 593.1, 689.1, 760,
    ];
    const fit = fitLeastSquares({
      start: [5, 1],
      ...everywhere,
      // in hundreds and ten-thousandths
      residuals: ([b1, b2]) =>
        Float64Array.from(
          pressure,
          (x, i) => 100 * b1 * (1 - Math.exp(-b2 * 1e-4 * x)) - volume[i],
        ),
    });
    expect(100 * fit.point[0]).toBeCloseTo(238.942, 2);
    expect(fit.point[1]).toBeCloseTo(5.50156, 4);
    expect(fit.objective).toBeCloseTo(0.12455138894, 8);
  });

  it("walks Rosenbrock's valley to its end", () => {
    const fit = fitLeastSquares({
      start: [-1.2, 1],
      ...everywhere,
      residuals: ([x, y]) => Float64Array.of(10 * (y - x * x), 1 - x),
    });
    expect(fit.point[0]).toBeCloseTo(1, 4);
    expect(fit.point[1]).toBeCloseTo(1, 4);
    expect(fit.startObjective).toBeCloseTo(24.2, 10);
  });

  it("stays at a bound that the minimum lies beyond, and still moves the rest", () => {
    const fit = fitLeastSquares({
      start: [0, 0],
      lowest: [-1, -5],
      highest: [0.5, 5],
      residuals: ([x, y]) => Float64Array.of(x - 2, y - 3),
    });
    expect(fit.point[0]).toBe(0.5);
    expect(fit.point[1]).toBeCloseTo(3, 6);
  });

  it("walks around points that have no residuals", () => {
    const fit = fitLeastSquares({
      start: [0.5, 0],
      ...everywhere,
      residuals: ([x, y]) => (x > 1.5 ? null : Float64Array.of(Math.log(x / 1.2), y - 1)),
    });
    expect(fit.point[0]).toBeCloseTo(1.2, 6);
  });

  it("refuses a start outside the bounds, or without residuals", () => {
    const problem = { start: [2, 0], lowest: [0, 0], highest: [1, 1] };
    const residuals = () => Float64Array.of(1);
    expect(() => fitLeastSquares({ ...problem, residuals })).toThrow(DomainError);
    expect(() => fitLeastSquares({ ...problem, start: [1, 0], residuals: () => null })).toThrow(
      DomainError,
    );
  });

  it("gives no answer when its iterations run out", () => {
    expect(() =>
      fitLeastSquares({
        start: [-1.2, 1],
        ...everywhere,
        maximumIterations: 2,
        residuals: ([x, y]) => Float64Array.of(10 * (y - x * x), 1 - x),
      }),
    ).toThrow(ConvergenceError);
  });
});
