import { describe, expect, it } from "vitest";
import { ForbiddenError } from "@/services/errors";
import { estimateAbilities } from "@/services/estimate-states";
import {
  allowedActions,
  authorise,
  can,
  policy,
  refusal,
  type Action,
  type Actor,
  type Role,
} from "@/services/policy";

const roles: Role[] = ["engineer", "reviewer", "planner", "executive", "administrator"];

/** Written out by hand, one letter a role (E R P X A), so that a slip in the policy does not repeat itself here. */
const expected: Record<Action, string> = {
  "session.read": "ERPXA",
  "portfolio.read": "ERPXA",
  "basin.read": "ERPXA",
  "field.read": "ERPXA",
  "reservoir.read": "ERPXA",
  "fluidSample.read": "ERPXA",
  "estimate.read": "ERPXA",
  "priceDeck.read": "ERPXA",
  "settings.read": "ERPXA",
  "dependenceSet.read": "ERPXA",
  "run.read": "ERPXA",
  "people.read": "ERPXA",
  "calculation.run": "ERPXA",
  "apiToken.manage": "ERPXA",
  "password.change": "ERPXA",
  "basin.create": "E.P.A",
  "basin.update": "..P..",
  "field.create": "E.P.A",
  "field.update": "E.P..",
  "field.updateCommercial": "..P..",
  "reservoir.create": "E....",
  "reservoir.update": "E....",
  "fluidSample.create": "E....",
  "fluidSample.update": "E....",
  "estimate.create": "E....",
  "estimate.update": "E....",
  "estimate.run": "E....",
  "estimate.submit": "E....",
  "estimate.discard": "E....",
  "estimate.approve": ".R...",
  "estimate.return": ".R...",
  "import.read": "ERP..",
  "import.create": "E....",
  "export.create": "ERPX.",
  "run.create": "EP",
  "run.cancel": "EPA",
  "dependenceSet.create": "P",
  "dependenceSet.update": "P",
  "priceDeck.create": "..P..",
  "priceDeck.update": "..P..",
  "priceDeck.publish": "..P..",
  "user.read": "....A",
  "user.create": "....A",
  "user.update": "....A",
  "settings.update": "....A",
  "audit.read": "....A",
};

const letters: Record<Role, string> = {
  engineer: "E",
  reviewer: "R",
  planner: "P",
  executive: "X",
  administrator: "A",
};

function actor(role: Role, id = `the-${role}`): Actor {
  return { id, name: role, email: `${role}@quillmere.example`, role };
}

describe("policy", () => {
  it("names every action in this table and no other", () => {
    expect(Object.keys(policy).sort()).toEqual(Object.keys(expected).sort());
  });

  const pairs = (Object.keys(expected) as Action[]).flatMap((action) =>
    roles.map((role) => ({ action, role, allowed: expected[action].includes(letters[role]) })),
  );
  it.each(pairs)("answers $allowed when a $role asks for $action", ({ action, role, allowed }) => {
    expect(can(actor(role), action)).toBe(allowed);
  });

  it("lets an executive change nothing but their own password", () => {
    const writes = allowedActions(actor("executive")).filter(
      (action) => !/\.(read|run|manage)$/.test(action),
    );
    expect(writes).toEqual(["password.change", "export.create"]);
  });
});

describe("refusal(actor, action, estimate)", () => {
  const estimate = { createdBy: "somebody", submittedBy: "somebody" };

  it("refuses a reviewer who began the estimate, whoever submitted it", () => {
    const own = { ...estimate, createdBy: "the-reviewer" };
    expect(refusal(actor("reviewer"), "estimate.approve", own)).toMatch(/their own/);
    expect(refusal(actor("reviewer"), "estimate.return", own)).toMatch(/their own/);
  });

  it("refuses a reviewer who submitted the estimate, whoever began it", () => {
    const own = { ...estimate, submittedBy: "the-reviewer" };
    expect(refusal(actor("reviewer"), "estimate.approve", own)).toMatch(/their own/);
  });

  it("lets any other reviewer decide", () => {
    expect(refusal(actor("reviewer"), "estimate.approve", estimate)).toBeNull();
  });

  it("names the role that it takes", () => {
    expect(refusal(actor("planner"), "estimate.approve", estimate)).toContain("reviewer");
  });
});

describe("authorise(actor, action)", () => {
  it("throws a ForbiddenError when the role lacks the action", () => {
    expect(() => authorise(actor("engineer"), "user.create")).toThrow(ForbiddenError);
  });
});

describe("estimateAbilities(actor, estimate)", () => {
  const authors = { createdBy: "the-engineer", submittedBy: "the-engineer" };
  const abilities = (role: Role, state: "draft" | "submitted" | "approved" | "returned") =>
    Object.entries(estimateAbilities(actor(role), { ...authors, state }))
      .filter(([, able]) => able)
      .map(([name]) => name);

  it("lets an engineer work on a draft, and discard it", () => {
    expect(abilities("engineer", "draft")).toEqual(["update", "run", "submit", "discard"]);
  });

  it("lets an engineer work on a returned estimate, but not discard it", () => {
    expect(abilities("engineer", "returned")).toEqual(["update", "run", "submit"]);
  });

  it("lets a reviewer decide on a submitted estimate only", () => {
    expect(abilities("reviewer", "submitted")).toEqual(["approve", "return"]);
    expect(abilities("reviewer", "draft")).toEqual([]);
  });

  it("lets nobody change an approved estimate", () => {
    for (const role of roles) expect(abilities(role, "approved")).toEqual([]);
  });
});
