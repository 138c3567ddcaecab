/** What stands below the list of commands. */
export const PROGRAM_HELP = `
Examples
  tallystick check paper.pdf               what does not tally, and where
  tallystick check *.pdf --quiet           only the flags of several papers
  tallystick extract paper.pdf --as json   every result, for a program
  tallystick explain                       the rules, each with its question

Nothing leaves this machine: no part of Tallystick uses the network.
Each command has its own help: tallystick check --help
`;

/** What stands below the options of \`check\`. */
export const CHECK_HELP = `
Examples
  tallystick check paper.pdf
  tallystick check draft.txt --out report.txt
  tallystick check papers/*.pdf --as json --out flags.json
  tallystick check draft.pdf --fail-on caution   cautions also end with status 1
  cat abstract.txt | tallystick check            text from another program

Exit status
  0  nothing flagged (cautions alone leave 0)
  1  a contradiction or a discrepancy is flagged
  2  a file could not be read; the others are still reported

Grades
  contradiction  no rounding and no method reconciles the printed numbers
  discrepancy    the standard method does not give them; another might
  caution        the numbers stand, the words claim more than they carry
`;

/** What stands below the options of \`extract\`. */
export const EXTRACT_HELP = `
Examples
  tallystick extract paper.pdf
  tallystick extract papers/*.pdf --as json --out results.json
  echo "OR 1.59 (95% CI 1.05 to 2.41), p = 0.03" | tallystick extract

Exit status
  0  every file was read
  2  a file could not be read; the others are still listed
`;

/** What stands below the options of \`explain\`. */
export const EXPLAIN_HELP = `
Examples
  tallystick explain
  tallystick explain estimate-inside-interval
`;
