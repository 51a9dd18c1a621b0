/**
 * Questions asked inside the page, as text: they run in the browser, where no type of this project is known.
 * Contrast after WCAG 2.2, relative luminance and contrast ratio, from memory.
 */
export const LOW_CONTRAST = `(() => {
  const canvas = document.createElement("canvas").getContext("2d", { willReadFrequently: true });
  const rgba = (colour) => {
    canvas.clearRect(0, 0, 1, 1);
    canvas.fillStyle = colour;
    canvas.fillRect(0, 0, 1, 1);
    return canvas.getImageData(0, 0, 1, 1).data;
  };
  const channel = (value) => value / 255 <= 0.04045 ? value / 255 / 12.92 : ((value / 255 + 0.055) / 1.055) ** 2.4;
  const luminance = ([r, g, b]) => 0.2126 * channel(r) + 0.7152 * channel(g) + 0.0722 * channel(b);
  const backgroundOf = (element) => {
    for (let at = element; at; at = at.parentElement) {
      const colour = rgba(getComputedStyle(at).backgroundColor);
      if (colour[3] === 255) return colour;
    }
    return [255, 255, 255, 255];
  };
  const walker = document.createTreeWalker(document.body, NodeFilter.SHOW_TEXT);
  const found = [];
  let texts = 0;
  while (walker.nextNode()) {
    const element = walker.currentNode.parentElement;
    if (walker.currentNode.data.trim() === "" || element.closest("script, style, title, desc, details:not([open])")) continue;
    texts += 1;
    const style = getComputedStyle(element);
    const ink = rgba(element.namespaceURI.endsWith("svg") ? style.fill : style.color);
    const [a, b] = [luminance(ink), luminance(backgroundOf(element))].sort((x, y) => y - x);
    const ratio = (a + 0.05) / (b + 0.05);
    if (!(ratio >= 4.5)) found.push(ratio.toFixed(2) + " " + walker.currentNode.data.trim().slice(0, 40));
  }
  return { texts, found };
})()`;

export const OVERFLOW = `(() => ({
  page: document.documentElement.scrollWidth - document.documentElement.clientWidth,
  outside: Array.from(document.querySelectorAll("body *"))
    .filter((element) => !element.closest(".box") && element.getBoundingClientRect().right > innerWidth + 0.5)
    .map((element) => element.tagName + " " + element.textContent.slice(0, 30)),
}))()`;

/** Boxes that scroll but that a keyboard cannot reach, or that have no name. */
export const UNREACHABLE_BOXES = `Array.from(document.querySelectorAll(".box"))
  .filter((box) => box.tabIndex !== 0 || box.getAttribute("role") !== "group" || !box.getAttribute("aria-label"))
  .length`;

/** Labels of charts that stand outside their picture. */
export const CLIPPED_LABELS = `Array.from(document.querySelectorAll("svg.picture")).flatMap((svg) => {
  const frame = svg.getBoundingClientRect();
  return Array.from(svg.querySelectorAll("text"))
    .filter((text) => {
      const box = text.getBoundingClientRect();
      return box.left < frame.left - 1 || box.right > frame.right + 1 || box.top < frame.top - 1 || box.bottom > frame.bottom + 1;
    })
    .map((text) => svg.querySelector("title").textContent + ": " + text.textContent);
})`;

export const DUPLICATE_IDS = `(() => {
  const ids = Array.from(document.querySelectorAll("[id]"), (element) => element.id);
  return ids.filter((id, i) => ids.indexOf(id) !== i);
})()`;

export const BROKEN_LINKS = `Array.from(document.querySelectorAll('a[href^="#"]'), (a) => a.getAttribute("href"))
  .filter((href) => document.querySelector(href) === null)`;
