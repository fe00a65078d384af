#!/usr/bin/python3
"""Rise and set times by Skyfield, for the benchmark.

Reads JSON {"sets":[[line1,line2],...],"stations":[{latitudeDeg,longitudeDeg,altitudeM}],"limitDeg","fromMs","toMs"}
and writes {"cpuS", "version", "events":[[[[kind, ms], ...] for each station] for each set]}.
"""

import json
import sys
import time
from datetime import datetime, timezone

import skyfield
from skyfield.api import EarthSatellite, load, wgs84


def main():
    task = json.load(sys.stdin)
    timescale = load.timescale(builtin=True)
    start = timescale.from_datetime(datetime.fromtimestamp(task["fromMs"] / 1000, timezone.utc))
    end = timescale.tt_jd(start.tt + (task["toMs"] - task["fromMs"]) / 86400000)
    observers = [wgs84.latlon(s["latitudeDeg"], s["longitudeDeg"], s["altitudeM"]) for s in task["stations"]]
    satellites = [EarthSatellite(a, b, None, timescale) for a, b in task["sets"]]
    before = time.process_time()
    found = [
        [satellite.find_events(observer, start, end, altitude_degrees=task["limitDeg"]) for observer in observers]
        for satellite in satellites
    ]
    cpu = time.process_time() - before
    events = [
        [
            [[int(kind), (at - start.tt) * 86400000 + task["fromMs"]] for at, kind in zip(times.tt, kinds)]
            for times, kinds in each
        ]
        for each in found
    ]
    json.dump({"cpuS": cpu, "version": skyfield.__version__, "events": events}, sys.stdout)


if __name__ == "__main__":
    main()
