/** A declared number in words: "load.centreOfMass" as "centre of mass", "stages[0].driven" as "stage 1 driven". */
export function inputWords(input: string): string {
  return input
    .replace(/^load\./, "")
    .replace(/^stages\[(\d+)\]/, (_, index) => `stage ${Number(index) + 1}`)
    .replaceAll(".", " ")
    .replace(/[A-Z]/g, (capital) => ` ${capital.toLowerCase()}`);
}
