import { type Box, FACES, type PathMark, type Scene, type TextMark } from "./scene";

/**
 * A scene as the text of an SVG file. Fonts are named, not carried along: where they are missing, others of the same kind serve. `id`
 * begins the names inside it, which must differ where several stand on one page.
 */
export function sceneSvg(scene: Scene, id = "figure"): string {
  const clips = new Map<string, Box>();
  const body = scene.marks
    .map((mark) => (mark.kind === "text" ? textSvg(mark) : pathSvg(mark, clips, id)))
    .join("\n");
  const { width, height, title, description, background } = scene;
  const defined = [...clips].map(
    ([name, box]) =>
      `<clipPath id="${name}"><rect x="${box.left}" y="${box.top}" width="${box.width}" height="${box.height}"/></clipPath>`,
  );
  return `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}" role="img" aria-labelledby="${id}-title ${id}-description">
<title id="${id}-title">${escaped(title)}</title>
<desc id="${id}-description">${escaped(description)}</desc>
<defs>${defined.join("")}</defs>
<rect width="${width}" height="${height}" fill="${background}"/>
${body}
</svg>
`;
}

function textSvg({ x, y, text, size, face, bold, fill, anchor }: TextMark): string {
  const weight = bold ? ' font-weight="600"' : "";
  return `<text x="${short(x)}" y="${short(y)}" font-family="${FACES[face]}" font-size="${size}"${weight} fill="${fill}" text-anchor="${anchor}">${escaped(text)}</text>`;
}

function pathSvg(mark: PathMark, clips: Map<string, Box>, id: string): string {
  const d = mark.stretches
    .map(
      (points) => `M${points.map(([x, y]) => `${short(x)} ${short(y)}`).join("L")}${mark.closed ? "Z" : ""}`,
    )
    .join("");
  const clip = mark.clip === null ? "" : ` clip-path="url(#${clipOf(mark.clip, clips, id)})"`;
  const dash = mark.dash.length === 0 ? "" : ` stroke-dasharray="${mark.dash.join(" ")}"`;
  const stroke =
    mark.stroke === null
      ? ""
      : ` stroke="${mark.stroke}" stroke-width="${mark.width}" stroke-linejoin="round"${dash}`;
  const alpha = mark.alpha === 1 ? "" : ` opacity="${mark.alpha}"`;
  return `<path d="${d}" fill="${mark.fill ?? "none"}"${stroke}${alpha}${clip}/>`;
}

function clipOf(box: Box, clips: Map<string, Box>, id: string): string {
  for (const [name, known] of clips) if (JSON.stringify(known) === JSON.stringify(box)) return name;
  const name = `${id}-part-${clips.size + 1}`;
  clips.set(name, box);
  return name;
}

/** Hundredths of a px. */
function short(value: number): string {
  return String(Math.round(100 * value) / 100);
}

function escaped(text: string): string {
  return text
    .replaceAll("&", "&amp;")
    .replaceAll("<", "&lt;")
    .replaceAll(">", "&gt;")
    .replaceAll('"', "&quot;");
}
