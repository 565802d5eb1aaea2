// Run on its own by budget.test.ts: the test runner's module wrapper slows loops that call across modules. Prints one JSON line.
import { demoBudget } from '../bench/demoBudget.ts'

void demoBudget().then((measured) => console.log(JSON.stringify(measured)))
