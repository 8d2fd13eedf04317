/** A relation of a requirement: how it is written, and its margin, which must not be below 0. */
export interface RelationText {
  readonly id: string;
  readonly form: string;
  readonly margin: string;
  readonly says: string;
}

export const RELATIONS: readonly RelationText[] = [
  { id: "at-most", form: "VALUE <= B", margin: "m = B − v", says: "With `<` a margin of 0 breaks it." },
  { id: "at-least", form: "VALUE >= B", margin: "m = v − B", says: "With `>` a margin of 0 breaks it." },
  {
    id: "within",
    form: "VALUE within X ± W",
    margin: "m = w − ∣ v − X ∣",
    says: "In per cent, $w$ is that part of the size of $X$.",
  },
  {
    id: "between",
    form: "VALUE between A and B",
    margin: "m = min ( v − A , B − v )",
    says: "Both ends are allowed.",
  },
  {
    id: "rising",
    form: "TRACE rising",
    margin: "m_k = v_k − v_{k−1}",
    says: "Along the first knob from its low end; standing still breaks it. `falling` is the same with the sign reversed.",
  },
];
