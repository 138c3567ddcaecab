/** What stands below the list of commands. */
export const PROGRAM_HELP = `
Examples
  tallystick check paper.pdf               what does not tally, and where
  tallystick check *.pdf --quiet           only the flags of several papers
  tallystick extract paper.pdf --as json   every result, for a program
  tallystick recompute OR 1.59 1.05 2.41   what follows from numbers typed in
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

/** What stands below the options of \`recompute\`. */
export const RECOMPUTE_HELP = `
Forms, with what is typed behind them
  ratio           estimate and limits, --p: do they agree, and what they imply
      tallystick recompute ratio 1.59 1.05 2.41 --p 0.03
      tallystick recompute HR 0·72 0·58–0·90 --p "<0.001" --level 99
      tallystick recompute OR 1.59 --p 0.03              an interval from p
  difference      the same for risks and means, on their own scale
      tallystick recompute MD 17 1.4 32.6 --p 0.032
      tallystick recompute RD -5.2% -9.3% -1.1%
  coefficient     b of a logistic, Cox or Poisson model with its standard error
      tallystick recompute coefficient -0.46 --se 0.21
      tallystick recompute coefficient 0.46 0.21 --ratio "1.58 (1.05-2.39)"
  counts          events/people: risks, ratios, difference, number needed, tests
      tallystick recompute counts 45/120 30/118
      tallystick recompute counts 45/120 30/118 --printed "OR 1.76 (1.01-3.06)"
      tallystick recompute counts "45/120 (37.5%)"       one group: intervals
  risk            a ratio where so many of the unexposed have the outcome
      tallystick recompute risk 2.0 --baseline 30%
      tallystick recompute risk 0.72 --measure HR --baseline 20-40%
  compare         two ratios of separate groups: do they differ
      tallystick recompute compare 0.67 0.46 0.98 with 0.88 0.71 1.08
  discrimination  an area under the ROC curve with the sizes of both groups
      tallystick recompute AUC 0.78 --events 40 --others 120

A result pasted whole, in quotation marks, or with - into the terminal:
      tallystick recompute "OR 1.59 (95% CI 1.05–2.41), p = 0.03"
      tallystick recompute "t(18) = 2.10, p = 0.03"

Type numbers as they are printed: 0·72, .72, 0,72, 35%, 1.05–2.41, −0.46. A
printed number stands for all that round to it, so most answers are ranges.
What holds brackets, < or > needs quotation marks.

Exit status
  0  there is an answer, whether the numbers agree or not
  2  the numbers were not understood
`;

/** What stands below the options of \`explain\`. */
export const EXPLAIN_HELP = `
Examples
  tallystick explain
  tallystick explain estimate-inside-interval
`;
