/** One line of what is going on, for the person in front of the terminal. */
export const say = (line) => console.log(line);

/** A problem with one clear sentence for the person who started the program. */
export class SetupProblem extends Error {}

/** Runs the program's main function; a known problem ends with its sentence, anything else with its trace. */
export async function runMain(main) {
  try {
    await main();
  } catch (error) {
    console.error(error instanceof SetupProblem ? `\n${error.message}` : error);
    process.exitCode = 1;
  }
}
