/** Keys and what they do; keys by their names on a usual keyboard. */
export interface KeyList {
  readonly where: string;
  readonly keys: readonly (readonly [keys: string, does: string])[];
}

/** All keys of the program beside those every browser has. */
export const KEY_LISTS: readonly KeyList[] = [
  {
    where: "Everywhere",
    keys: [
      ["Ctrl K", "Find or do something"],
      ["?", "This list, outside of fields"],
      ["F8", "To the messages in the corner"],
      ["Esc", "Closes what is open and gives the focus back"],
    ],
  },
  {
    where: "On a sheet",
    keys: [
      ["Ctrl ↵", "Queue run"],
      ["Ctrl S", "Save revision"],
    ],
  },
  {
    where: "In the text of a netlist",
    keys: [
      ["Ctrl M", "Lets Tab move on, or indent again"],
      ["Ctrl Space", "Complete"],
      ["F1", "Tell what stands here"],
      ["Ctrl .", "Mend what is wrong here"],
      ["F2", "Rename"],
      ["F12", "Go to where it is declared"],
      ["Shift F12", "List its places"],
      ["Ctrl Shift O", "Outline"],
      ["Shift Alt F", "Format"],
      ["Ctrl /", "Comment or uncomment"],
      ["Ctrl Z", "Undo"],
    ],
  },
  {
    where: "On a plot",
    keys: [
      ["← →", "The cursor by a point; with Shift by ten"],
      ["↑ ↓", "The cursor to another setting"],
      ["Home End", "The cursor to an end of what is in view"],
      ["↵", "Choose the point and read its account"],
      ["Z", "At both ends of a part: show that part"],
      ["+ −", "Closer, wider"],
      [", .", "Along the ruler"],
      ["Backspace", "The view before"],
      ["0", "The whole sweep"],
    ],
  },
  {
    where: "In a drawing of connections",
    keys: [
      ["← ↑ → ↓", "To the next part or net"],
      ["Shift ← ↑ → ↓", "Moves the drawing"],
      ["↵", "Choose it, open or close it"],
      ["+ −", "Larger, smaller"],
    ],
  },
];
