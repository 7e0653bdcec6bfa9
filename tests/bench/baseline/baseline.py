"""Reference forecasts and plans from scenario files: what a practitioner would script with NumPy and SciPy.

    python3 baseline.py forecast FILE [--refine N]
    python3 baseline.py plan FILE [--method cuts|slsqp] [--tolerance T]
"""

import argparse
import json
import sys
import time

from field import Field, read_scenario
from forecast import forecast, summary


def main():
    parser = argparse.ArgumentParser(description=__doc__, formatter_class=argparse.RawDescriptionHelpFormatter)
    parser.add_argument("command", choices=["forecast", "plan"])
    parser.add_argument("file")
    parser.add_argument("--refine", type=int, default=1, help="divides every time step")
    parser.add_argument("--method", choices=["cuts", "slsqp"], default="cuts")
    parser.add_argument("--tolerance", type=float, default=1e-5, help="relative gap at which the plan is done")
    arguments = parser.parse_args()
    started = time.perf_counter()
    scenario = read_scenario(arguments.file)
    field = Field(scenario)
    weeks = scenario["plan"]["weeks"]
    look_ahead = scenario["plan"].get("lookAheadWeeks", 26)
    if arguments.command == "forecast":
        rows = forecast(field, field.given_rates(weeks), look_ahead, arguments.refine)
        answer = summary(field, rows)
    else:
        from plan import Infeasible, plan

        try:
            answer = plan(field, arguments.method, arguments.tolerance, arguments.refine)
        except Infeasible as reason:
            print(f"no plan keeps every limit: {reason}", file=sys.stderr)
            return 3
    answer["seconds"] = time.perf_counter() - started
    json.dump(answer, sys.stdout, indent=1)
    print()
    return 0


if __name__ == "__main__":
    sys.exit(main())
