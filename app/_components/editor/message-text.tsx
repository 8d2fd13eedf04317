/** The sentence of a problem; what it quotes from the text between back quotes is set as such. */
export function MessageText({ message }: { readonly message: string }) {
  return messagePieces(message).map((piece) =>
    piece.quoted ? <code key={piece.at}>{piece.text}</code> : <span key={piece.at}>{piece.text}</span>,
  );
}

/** A sentence cut where its back quotes stand; a lone one is a character like any other. */
export function messagePieces(message: string): { at: number; quoted: boolean; text: string }[] {
  const pieces = [];
  for (const match of message.matchAll(/`([^`]*)`|(?:[^`]|`(?![^`]*`))+/g)) {
    const quoted = match[1] !== undefined;
    pieces.push({ at: match.index, quoted, text: match[1] ?? match[0] });
  }
  return pieces;
}
