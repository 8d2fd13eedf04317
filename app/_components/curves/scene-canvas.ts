import { FACES, type Mark, type Scene } from "./scene";

/** A scene as a PNG of so many pixels a px of the scene. Throws an Error where the browser gives no picture, for want of memory say. */
export async function scenePng(scene: Scene, scale = 2): Promise<Blob> {
  const canvas = document.createElement("canvas");
  canvas.width = Math.round(scene.width * scale);
  canvas.height = Math.round(scene.height * scale);
  const context = canvas.getContext("2d");
  if (context === null) throw new Error("This browser gives no canvas to draw the picture on.");
  await document.fonts.ready;
  context.scale(scale, scale);
  context.fillStyle = scene.background;
  context.fillRect(0, 0, scene.width, scene.height);
  for (const mark of scene.marks) paint(context, mark);
  const blob = await new Promise<Blob | null>((resolve) => canvas.toBlob(resolve, "image/png"));
  if (blob === null) throw new Error("This browser could not make a picture of that size.");
  return blob;
}

function paint(context: CanvasRenderingContext2D, mark: Mark): void {
  context.save();
  if (mark.kind === "text") {
    context.font = `${mark.bold ? "600 " : ""}${mark.size}px ${FACES[mark.face]}`;
    context.textAlign = mark.anchor === "middle" ? "center" : mark.anchor;
    context.fillStyle = mark.fill;
    context.fillText(mark.text, mark.x, mark.y);
    context.restore();
    return;
  }
  context.globalAlpha = mark.alpha;
  if (mark.clip !== null) {
    context.beginPath();
    context.rect(mark.clip.left, mark.clip.top, mark.clip.width, mark.clip.height);
    context.clip();
  }
  context.beginPath();
  for (const points of mark.stretches) {
    points.forEach(([x, y], i) => {
      if (i === 0) context.moveTo(x, y);
      else context.lineTo(x, y);
    });
    if (mark.closed) context.closePath();
  }
  if (mark.fill !== null) {
    context.fillStyle = mark.fill;
    context.fill();
  }
  if (mark.stroke !== null) {
    context.strokeStyle = mark.stroke;
    context.lineWidth = mark.width;
    context.lineJoin = "round";
    context.setLineDash([...mark.dash]);
    context.stroke();
  }
  context.restore();
}
