/**
 * Turns a drawn figure into one svg that stands alone. Charts here are a stretching svg with type and
 * dots in HTML over it, so serialising the svg would lose every word: this walks what is on the
 * screen and writes it down as shapes and text with their computed colours.
 */

const SVG = "http://www.w3.org/2000/svg";
const shapeStyles = [
  "fill",
  "fill-opacity",
  "stroke",
  "stroke-width",
  "stroke-dasharray",
  "stroke-linecap",
  "opacity",
  "vector-effect",
];
const textStyles = ["font-family", "font-size", "font-style", "font-weight", "fill"];

const isClear = (colour: string) =>
  colour === "transparent" || /,\s*0\)$|\/\s*0\)$/.test(colour.trim());

function create(name: string, attributes: Record<string, string | number>) {
  const element = document.createElementNS(SVG, name);
  for (const [key, value] of Object.entries(attributes)) element.setAttribute(key, String(value));
  return element;
}

/** Copies an svg with the computed look of every shape written on it. */
function copySvg(source: SVGSVGElement, box: DOMRect, origin: DOMRect) {
  const copy = source.cloneNode(true) as SVGSVGElement;
  const originals = source.querySelectorAll("*");
  copy.querySelectorAll("*").forEach((element, index) => {
    const computed = getComputedStyle(originals[index]);
    const names =
      element.tagName === "text" || element.tagName === "tspan" ? textStyles : shapeStyles;
    for (const name of names) element.setAttribute(name, computed.getPropertyValue(name));
    element.removeAttribute("class");
    element.removeAttribute("style");
  });
  for (const name of ["class", "style", "role", "aria-label"]) copy.removeAttribute(name);
  copy.setAttribute("x", String(box.left - origin.left));
  copy.setAttribute("y", String(box.top - origin.top));
  copy.setAttribute("width", String(box.width));
  copy.setAttribute("height", String(box.height));
  copy.setAttribute("overflow", "visible");
  return copy;
}

/** Ground and border of an HTML element: bars, dots (a diamond is a turned square), rules. */
function copyBox(element: HTMLElement, origin: DOMRect) {
  const style = getComputedStyle(element);
  const hasBorder = parseFloat(style.borderTopWidth) > 0 && !isClear(style.borderTopColor);
  if (isClear(style.backgroundColor) && !hasBorder) return null;
  const box = element.getBoundingClientRect();
  if (box.width === 0 || box.height === 0) return null;
  const isTurned = style.transform.startsWith("matrix(0.7");
  const side = isTurned ? element.offsetWidth : box.width;
  const tall = isTurned ? element.offsetHeight : box.height;
  const centre = {
    x: box.left - origin.left + box.width / 2,
    y: box.top - origin.top + box.height / 2,
  };
  const rect = create("rect", {
    x: centre.x - side / 2,
    y: centre.y - tall / 2,
    width: side,
    height: tall,
    rx: style.borderTopLeftRadius.endsWith("%")
      ? side / 2
      : Math.min(parseFloat(style.borderTopLeftRadius) || 0, side / 2),
    fill: isClear(style.backgroundColor) ? "none" : style.backgroundColor,
  });
  if (hasBorder) {
    rect.setAttribute("stroke", style.borderTopColor);
    rect.setAttribute("stroke-width", style.borderTopWidth);
  }
  if (isTurned) rect.setAttribute("transform", `rotate(45 ${centre.x} ${centre.y})`);
  return rect;
}

function copyText(node: Text, origin: DOMRect) {
  const content = node.textContent?.replace(/\s+/g, " ") ?? "";
  const parent = node.parentElement;
  if (!content.trim() || !parent) return null;
  const range = document.createRange();
  range.selectNodeContents(node);
  const box = range.getBoundingClientRect();
  if (box.width === 0) return null;
  const style = getComputedStyle(parent);
  const text = create("text", {
    x: box.left - origin.left,
    // The baseline of these faces lies about 77 % down the line box of the glyphs.
    y: box.top - origin.top + box.height * 0.77,
    fill: style.color,
    "font-family": style.fontFamily,
    "font-size": style.fontSize,
    "font-weight": style.fontWeight,
    "font-style": style.fontStyle,
    "xml:space": "preserve",
    // Opened where our faces are not installed, a word keeps its width and meets no neighbour.
    textLength: box.width,
    lengthAdjust: "spacingAndGlyphs",
  });
  text.textContent = content;
  return text;
}

const isHidden = (element: Element) => {
  const style = getComputedStyle(element);
  return style.display === "none" || style.visibility === "hidden" || element.matches(".sr-only");
};

/** Room for the titles of axes, which stand outside the drawing's box [px]. */
const MARGIN = 20;

/** The figure inside `root` as the text of an svg file. */
export function svgOf(root: HTMLElement, title: string): string {
  const origin = root.getBoundingClientRect();
  const drawing = create("svg", {
    xmlns: SVG,
    viewBox: `${-MARGIN} ${-MARGIN} ${origin.width + 2 * MARGIN} ${origin.height + 2 * MARGIN}`,
    width: origin.width + 2 * MARGIN,
    height: origin.height + 2 * MARGIN,
  });
  const name = create("title", {});
  name.textContent = title;
  const ground = create("rect", {
    x: -MARGIN,
    y: -MARGIN,
    width: "100%",
    height: "100%",
    fill: getComputedStyle(document.body).backgroundColor,
  });
  drawing.append(name, ground);

  const visit = (node: Node) => {
    if (node instanceof Text) {
      const text = copyText(node, origin);
      if (text) drawing.append(text);
    } else if (node instanceof SVGSVGElement) {
      if (!isHidden(node)) drawing.append(copySvg(node, node.getBoundingClientRect(), origin));
    } else if (node instanceof HTMLElement && !isHidden(node)) {
      const box = copyBox(node, origin);
      if (box) drawing.append(box);
      node.childNodes.forEach(visit);
    }
  };
  root.childNodes.forEach(visit);
  return new XMLSerializer().serializeToString(drawing);
}
