import { Section } from "@/components/ui/section";
import { describeSchema, sharedShapes } from "./describe-schema";
import { shapeAnchor, ShapeTable } from "./shape-table";

/** Shapes that several calculations share. */
export function SharedShapes() {
  return (
    <Section
      title="Shapes that several calculations share"
      note="An impossible value is answered with status 422 and, for each, a pointer into the request and the reason in words."
    >
      <div className="grid grid-cols-1 gap-8">
        {Object.entries(sharedShapes).map(([id, { title, schema }]) => (
          <div key={id} id={shapeAnchor(id)}>
            <ShapeTable caption={title} rows={describeSchema(schema, "input")} isRequest />
          </div>
        ))}
      </div>
    </Section>
  );
}
