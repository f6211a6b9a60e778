import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { nearestCorrelation } from "@/analytics/numerics/nearest-correlation";
import { symmetricEigen } from "@/analytics/numerics/symmetric-eigen";

const flat = (rows: number[][]) => Float64Array.from(rows.flat());

function expectMatrix(actual: Float64Array, expected: number[][], digits: number) {
  expected.flat().forEach((value, i) => expect(actual[i]).toBeCloseTo(value, digits));
}

describe("nearestCorrelation", () => {
  // N. J. Higham, IMA J. Numer. Anal. 22 (2002) 329-343, section 4 (four printed decimals); six decimals and the
  // distances from SciPy 1.17.1, minimising over unit-row factors with BFGS from eight starts.
  it.each([
    {
      name: "Higham's 3 x 3",
      matrix: [
        [1, 1, 0],
        [1, 1, 1],
        [0, 1, 1],
      ],
      nearest: [
        [1, 0.76069, 0.157298],
        [0.76069, 1, 0.76069],
        [0.157298, 0.76069, 1],
      ],
      distance: 0.52779,
    },
    {
      name: "Higham's 4 x 4",
      matrix: [
        [2, -1, 0, 0],
        [-1, 2, -1, 0],
        [0, -1, 2, -1],
        [0, 0, -1, 2],
      ],
      nearest: [
        [1, -0.808412, 0.191588, 0.106775],
        [-0.808412, 1, -0.656233, 0.191588],
        [0.191588, -0.656233, 1, -0.808412],
        [0.106775, 0.191588, -0.808412, 1],
      ],
      distance: 2.133729,
    },
    {
      name: "a contradictory 3 x 3",
      matrix: [
        [1, 0.9, 0.7],
        [0.9, 1, -0.9],
        [0.7, -0.9, 1],
      ],
      nearest: [
        [1, 0.553577, 0.387105],
        [0.553577, 1, -0.553577],
        [0.387105, -0.553577, 1],
      ],
      distance: 0.822096,
    },
    {
      name: "an almost possible 4 x 4",
      matrix: [
        [1, -0.55, -0.15, -0.1],
        [-0.55, 1, 0.9, 0.9],
        [-0.15, 0.9, 1, 0.9],
        [-0.1, 0.9, 0.9, 1],
      ],
      nearest: [
        [1, -0.536318, -0.154856, -0.107063],
        [-0.536318, 1, 0.888603, 0.883422],
        [-0.154856, 0.888603, 1, 0.905884],
        [-0.107063, 0.883422, 0.905884, 1],
      ],
      distance: 0.037417,
    },
  ])("gives $name", ({ matrix, nearest, distance }) => {
    const found = nearestCorrelation(flat(matrix), matrix.length);
    expectMatrix(found.matrix, nearest, 5);
    expect(found.distance).toBeCloseTo(distance, 5);
  });

  it("leaves a correlation matrix as it is", () => {
    const matrix = flat([
      [1, 0.5, 0.2],
      [0.5, 1, -0.3],
      [0.2, -0.3, 1],
    ]);
    const found = nearestCorrelation(matrix, 3);
    expect([...found.matrix]).toEqual([...matrix]);
    expect(found.distance).toBe(0);
    expect(found.smallestEigenvalue).toBeGreaterThan(0);
  });

  it("gives ones on the diagonal and no eigenvalue below the floor, whatever it is given", () => {
    const entry = fc.double({ min: -1, max: 1, noNaN: true });
    fc.assert(
      fc.property(fc.array(entry, { minLength: 10, maxLength: 10 }), (entries) => {
        const matrix = new Float64Array(25).fill(1);
        let next = 0;
        for (let i = 0; i < 5; i += 1) {
          for (let j = 0; j < i; j += 1) {
            matrix[i * 5 + j] = matrix[j * 5 + i] = entries[next];
            next += 1;
          }
        }
        const { matrix: found } = nearestCorrelation(matrix, 5, { floor: 1e-3, tolerance: 1e-9 });
        for (let i = 0; i < 5; i += 1) expect(found[i * 6]).toBe(1);
        expect(symmetricEigen(found, 5).values[0]).toBeGreaterThan(1e-3 - 1e-7);
      }),
    );
  });

  it("refuses a matrix that is not symmetric", () => {
    expect(() =>
      nearestCorrelation(
        flat([
          [1, 0.2],
          [0.3, 1],
        ]),
        2,
      ),
    ).toThrow("is symmetric");
  });
});

describe("symmetricEigen", () => {
  it("gives the eigenvalues of the second difference in closed form", () => {
    // 2 - 2 cos(k pi / (n + 1)), k = 1..n
    const n = 6;
    const matrix = Float64Array.from({ length: n * n }, (_, i) => {
      const gap = Math.abs(Math.floor(i / n) - (i % n));
      return gap === 0 ? 2 : gap === 1 ? -1 : 0;
    });
    const { values, vectors } = symmetricEigen(matrix, n);
    values.forEach((value, k) => {
      expect(value).toBeCloseTo(2 - 2 * Math.cos(((k + 1) * Math.PI) / (n + 1)), 13);
      const image = Array.from({ length: n }, (_, i) =>
        vectors[k].reduce((sum, entry, j) => sum + matrix[i * n + j] * entry, 0),
      );
      image.forEach((entry, i) => expect(entry).toBeCloseTo(value * vectors[k][i], 12));
    });
  });
});
