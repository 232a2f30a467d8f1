/** What `--help` prints. */
export const helpText = `Tautline: survey a venue before a blind client is led through it by a robot on a leash.

Usage: npm run --silent tautline -- COMMAND ...

assess FILE
  Judges a survey and prints one JSON object. SI units; verdicts are usable, with-cautions, with-help, do-not-use,
  not-known.
  --team FILE    another team card than the survey's own
  --code PACK    us-ada-2010, uk-adm-k, iso-21542 or own
  --walk ID      one walk alone
  --on DATE      the day judged for, like 2026-11-30; default today. A demo venue keeps its own day.
  --memo FILE    keep what the planner worked out, for the next run

clearance --scene turn|sidedoor|indoor|uturn|chicane|FILE --separation S
  Asks the planner for the room of one scene and prints one JSON object; metres and degrees.
  --w1 --w2 --angle                 turn
  --w --p --t                       sidedoor
  --w --p --t --o                   indoor
  --w1 --k --w2 --e                 uturn
  --w --j --s                       chicane
  --a --b --d --r --g --phi-max --sideways yes|no    the team
  --lead --drift --direction forward|reverse --pauses-at --motion FILE

sheet FILE --for client|venue|file|reception --form FORM --out DIR
  Writes DIR/WALK-READER.ENDING for each walk and prints the paths.
  --form         html, text, pdf, braille, word, geojson, csv or audio
  --draft        unfinished: every heading says DRAFT
  --walk, --on, --team, --code, --memo as for assess

schema survey|team|pack
  Prints the JSON Schema of a file.

--help, --version

Exit 0 whatever the verdict; 2 where the input is at fault, with one line on what, where and what to do.
Local codes and licensed O&M practice take precedence. A qualified person must walk every route. This certifies nothing.
`
