/** What `--help` prints. */
export const HELP_TEXT = `Sightfell, batch command: the same study and the same numbers as the app, without the page.

npm run --silent study -- run     STUDY.json --out DIR [--candidate A] [--height 20] [--tilt 2] [--layers a,b|all] [--no-memo]
npm run --silent study -- points  STUDY.json --candidate A --height 20 --points in.csv [--tilt 2]
npm run --silent study -- horizon STUDY.json --candidate A --height 20 [--step 1 | --azimuths 12.5,17.5]
npm run --silent study -- cell    STUDY.json --candidate A --height 20 --at LON,LAT [--tilt 2]

STUDY.json is a study file. Files named in it are looked for beside it.

run      Works out every option of the study (candidate, mast height, tilt) and writes a folder.
         --out DIR        a new or empty folder, or one of an earlier run, which is replaced
         --candidate ID   only this candidate
         --height M       only this mast height of the study, m above ground
         --tilt DEG       only this tilt of the study, deg
         --layers LIST    further rasters beside the standard ones, by name with commas, or all:
                          height-to-see, depression, clutter-strength; for each need of a layer or polygon
                          suppression-needed, usable, probability-of-detection, signal-margin, cause-of-loss
         --no-memo        leave out memo.pdf
         In DIR: summary.json, memo.pdf; in DIR/<candidate>/<height>m: horizon.csv, in-sight.tif (per cent of the
         cell's ground in sight), coverage-floor.tif (m above mean sea level); below it in <tilt>deg:
         clutter-to-noise.tif (dB) and the further rasters.
points   Evaluates places, each on its own ray and at its own range, and prints one CSV row for each, in the same order.
         --points FILE    CSV with the columns lon and lat, degrees WGS 84; other columns are passed over
horizon  Prints the horizon as CSV: elevation of the screening point at the antenna, its range, height and place.
         --step DEG       azimuth step, 1 if nothing is said
         --azimuths LIST  these azimuths instead, true degrees with commas
cell     Prints every step behind the numbers of one place as JSON.
         --at LON,LAT     the place, degrees WGS 84

--height is the electrical centre above ground in metres, --tilt the elevation of the beam peak in degrees (negative is
down). points, horizon and cell take any height and tilt; run picks from those of the study.

CSV follows RFC 4180 with decimal points; an empty field is undefined. Progress and remarks go to stderr.
Exit codes: 0 done; 2 bad input, with one sentence on stderr that says where, what was found and what to do;
1 a fault of ours; 130 interrupted.

Results are predictions from a raster and models, to be confirmed by survey and trial. Not for navigation, separation,
minimum altitudes or operational use.
`
