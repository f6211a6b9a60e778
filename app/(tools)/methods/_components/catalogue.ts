/**
 * Every method that the product works with, in words: what a person needs to judge a figure and to defend it. Errors
 * are those of the tests beside the code; a new method gets its entry here.
 */
import { estimates, portfolio, conditions } from "./estimate-methods";
import {
  separatorTests,
  compositions,
  gases,
  equationOfState,
  depletion,
  recovery,
} from "./fluid-methods";
import type { MethodGroup } from "./method";

export const methodGroups: readonly MethodGroup[] = [
  separatorTests,
  compositions,
  gases,
  equationOfState,
  depletion,
  recovery,
  estimates,
  portfolio,
  conditions,
];
