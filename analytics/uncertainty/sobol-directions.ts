/**
 * Primitive polynomials and initial direction numbers of the Sobol sequence, dimensions 2 to 48 (the first dimension,
 * van der Corput's sequence, needs none): the beginning of the table `new-joe-kuo-6.21201`, whose criterion is the
 * quality of two-dimensional projections.
 *
 * @see S. Joe, F. Y. Kuo, Constructing Sobol sequences with better two-dimensional projections, SIAM J. Sci. Comput. 30
 *      (2008) 2635-2654, doi:10.1137/070709359
 *
 * Copyright (c) 2008, Frances Y. Kuo and Stephen Joe. All rights reserved.
 *
 * Redistribution and use in source and binary forms, with or without modification, are permitted provided that the
 * following conditions are met:
 *
 * - Redistributions of source code must retain the above copyright notice, this list of conditions and the following
 *   disclaimer.
 * - Redistributions in binary form must reproduce the above copyright notice, this list of conditions and the following
 *   disclaimer in the documentation and/or other materials provided with the distribution.
 * - Neither the names of the copyright holders nor the names of the University of New South Wales and the University of
 *   Waikato and its contributors may be used to endorse or promote products derived from this software without specific
 *   prior written permission.
 *
 * THIS SOFTWARE IS PROVIDED BY THE COPYRIGHT HOLDERS "AS IS" AND ANY EXPRESS OR IMPLIED WARRANTIES, INCLUDING, BUT NOT
 * LIMITED TO, THE IMPLIED WARRANTIES OF MERCHANTABILITY AND FITNESS FOR A PARTICULAR PURPOSE ARE DISCLAIMED. IN NO EVENT
 * SHALL THE COPYRIGHT HOLDERS BE LIABLE FOR ANY DIRECT, INDIRECT, INCIDENTAL, SPECIAL, EXEMPLARY, OR CONSEQUENTIAL
 * DAMAGES (INCLUDING, BUT NOT LIMITED TO, PROCUREMENT OF SUBSTITUTE GOODS OR SERVICES; LOSS OF USE, DATA, OR PROFITS; OR
 * BUSINESS INTERRUPTION) HOWEVER CAUSED AND ON ANY THEORY OF LIABILITY, WHETHER IN CONTRACT, STRICT LIABILITY, OR TORT
 * (INCLUDING NEGLIGENCE OR OTHERWISE) ARISING IN ANY WAY OUT OF THE USE OF THIS SOFTWARE, EVEN IF ADVISED OF THE
 * POSSIBILITY OF SUCH DAMAGE.
 */

/** Degree s of the polynomial, its inner coefficients a_1 ... a_(s-1) as the bits of one number, and m_1 ... m_s. */
type Directions = readonly [degree: number, coefficients: number, initial: readonly number[]];

// prettier-ignore
export const JOE_KUO_DIRECTIONS: readonly Directions[] = [
  [1, 0, [1]],
  [2, 1, [1, 3]],
  [3, 1, [1, 3, 1]],
  [3, 2, [1, 1, 1]],
  [4, 1, [1, 1, 3, 3]],
  [4, 4, [1, 3, 5, 13]],
  [5, 2, [1, 1, 5, 5, 17]],
  [5, 4, [1, 1, 5, 5, 5]],
  [5, 7, [1, 1, 7, 11, 19]],
  [5, 11, [1, 1, 5, 1, 1]],
  [5, 13, [1, 1, 1, 3, 11]],
  [5, 14, [1, 3, 5, 5, 31]],
  [6, 1, [1, 3, 3, 9, 7, 49]],
  [6, 13, [1, 1, 1, 15, 21, 21]],
  [6, 16, [1, 3, 1, 13, 27, 49]],
  [6, 19, [1, 1, 1, 15, 7, 5]],
  [6, 22, [1, 3, 1, 15, 13, 25]],
  [6, 25, [1, 1, 5, 5, 19, 61]],
  [7, 1, [1, 3, 7, 11, 23, 15, 103]],
  [7, 4, [1, 3, 7, 13, 13, 15, 69]],
  [7, 7, [1, 1, 3, 13, 7, 35, 63]],
  [7, 8, [1, 3, 5, 9, 1, 25, 53]],
  [7, 14, [1, 3, 1, 13, 9, 35, 107]],
  [7, 19, [1, 3, 1, 5, 27, 61, 31]],
  [7, 21, [1, 1, 5, 11, 19, 41, 61]],
  [7, 28, [1, 3, 5, 3, 3, 13, 69]],
  [7, 31, [1, 1, 7, 13, 1, 19, 1]],
  [7, 32, [1, 3, 7, 5, 13, 19, 59]],
  [7, 37, [1, 1, 3, 9, 25, 29, 41]],
  [7, 41, [1, 3, 5, 13, 23, 1, 55]],
  [7, 42, [1, 3, 7, 3, 13, 59, 17]],
  [7, 50, [1, 3, 1, 3, 5, 53, 69]],
  [7, 55, [1, 1, 5, 5, 23, 33, 13]],
  [7, 56, [1, 1, 7, 7, 1, 61, 123]],
  [7, 59, [1, 1, 7, 9, 13, 61, 49]],
  [7, 62, [1, 3, 3, 5, 3, 55, 33]],
  [8, 14, [1, 3, 1, 15, 31, 13, 49, 245]],
  [8, 21, [1, 3, 5, 15, 31, 59, 63, 97]],
  [8, 22, [1, 3, 1, 11, 11, 11, 77, 249]],
  [8, 38, [1, 3, 1, 11, 27, 43, 71, 9]],
  [8, 47, [1, 1, 7, 15, 21, 11, 81, 45]],
  [8, 49, [1, 3, 7, 3, 25, 31, 65, 79]],
  [8, 50, [1, 3, 1, 1, 19, 11, 3, 205]],
  [8, 52, [1, 1, 5, 9, 19, 21, 29, 157]],
  [8, 56, [1, 3, 7, 11, 1, 33, 89, 185]],
  [8, 67, [1, 3, 3, 3, 15, 9, 79, 71]],
  [8, 70, [1, 3, 7, 11, 15, 39, 119, 27]],
];
