#!/usr/bin/env python3
"""Makes a site in Foothold from two GeoTIFFs, simulates it, and fetches results. Needs Python 3.9 or later and nothing else.

    export FOOTHOLD_TOKEN=fh_...     # made on the account page
    python3 run_site.py site http://localhost:4173 habitat.tif cover.tif settings.json out --product /path/to/foothold
    python3 run_site.py fetch http://localhost:4173 RUN_ID out

`site` needs a token that may read and write, `fetch` one that may read. See docs/api.md.
"""

import argparse
import hashlib
import json
import os
import pathlib
import shutil
import subprocess
import sys
import time
import urllib.error
import urllib.request
import uuid


class Refused(Exception):
    """The server said no; the text says what was found and how to mend it."""


class Foothold:
    """Asks the API as the person of an access token."""

    def __init__(self, url, token):
        self.url = url.rstrip("/")
        self.token = token

    def ask(self, method, path, body=None, content_type="application/json"):
        """The open reply to one request. Read it within `with`."""
        request = urllib.request.Request(self.url + path, data=body, method=method)
        request.add_header("Authorization", "Bearer " + self.token)
        if body is not None:
            request.add_header("Content-Type", content_type)
        try:
            return urllib.request.urlopen(request, timeout=300)
        except urllib.error.HTTPError as error:
            raise Refused(problem_text(error)) from None

    def json(self, method, path, body=None):
        data = None if body is None else json.dumps(body).encode()
        with self.ask(method, path, data) as reply:
            text = reply.read()
        return json.loads(text) if text else None

    def send_file(self, path, file, fields):
        """Sends a file and text fields as a form (multipart/form-data), and returns the JSON of the reply."""
        boundary = uuid.uuid4().hex
        parts = []
        for name, value in fields.items():
            parts.append(f'--{boundary}\r\nContent-Disposition: form-data; name="{name}"\r\n\r\n{value}\r\n'.encode())
        name = file.name.replace('"', "")
        head = f'--{boundary}\r\nContent-Disposition: form-data; name="file"; filename="{name}"\r\n'
        parts.append(head.encode() + b"Content-Type: image/tiff\r\n\r\n" + file.read_bytes() + b"\r\n")
        parts.append(f"--{boundary}--\r\n".encode())
        with self.ask("POST", path, b"".join(parts), f"multipart/form-data; boundary={boundary}") as reply:
            return json.load(reply)

    def save(self, path, file):
        """Saves a reply of bytes: under its name only once it is whole."""
        partial = file.with_name(file.name + ".partial")
        with self.ask("GET", path) as reply, open(partial, "wb") as out:
            shutil.copyfileobj(reply, out)
        partial.replace(file)
        print(f"saved {file}")


def problem_text(error):
    """What a problem (RFC 9457) says, with the fields that are wrong."""
    text = error.read()
    try:
        problem = json.loads(text)
    except ValueError:
        return f"{error.code}: {text[:200]!r}"
    return f"{error.code} {problem.get('code')}: {problem.get('detail')}"


def choose_team(api, name):
    teams = api.json("GET", "/api/teams")["teams"]
    fitting = [team for team in teams if name in (None, team["teamName"])]
    if len(fitting) != 1:
        raise Refused(f"The token reaches {[team['teamName'] for team in teams]}; say which with --team NAME.")
    return fitting[0]["teamId"]


def wait_for(api, team, upload, wanted):
    """Asks until an upload has come to one of the wanted states; the server reads and aligns rasters in the background."""
    while upload["state"] not in wanted:
        if upload["state"] in ("refused", "failed", "cancelled"):
            raise Refused(f"{upload['fileName']}: {(upload['problem'] or {}).get('detail', upload['state'])}")
        if upload["state"] == "choices" and "choices" not in wanted:
            raise Refused(f"{upload['fileName']}: somebody must decide about {upload['decisions']}; open the site's Ground page.")
        time.sleep(0.5)
        upload = api.json("GET", f"/api/teams/{team}/uploads/{upload['id']}")
    return upload


def make_site(api, team, name, habitat, cover, settings):
    """Uploads both rasters, makes a site of them and sets class table, plant and outlook. Returns the site."""
    uploads = f"/api/teams/{team}/uploads"
    upload = wait_for(api, team, api.send_file(uploads, habitat, {"part": "habitat"}), ["choices"])
    open_questions = set(upload["decisions"]) & {"part", "band", "heights", "values"}
    if open_questions or upload["plan"] is None:
        raise Refused(f"{habitat.name}: {(upload['problem'] or {}).get('detail') or sorted(open_questions)}")
    # Making the site agrees to the plan: read upload["plan"]["cautions"] before you do so with a raster that you do not know.
    for caution in upload["plan"]["cautions"]:
        print(f"note: {caution['text']}")
    site = api.json("POST", f"{uploads}/{upload['id']}/site", {"name": name})
    print(f"made the site {site['id']}")
    wait_for(api, team, api.json("GET", f"{uploads}/{upload['id']}"), ["done"])
    second = {"siteId": site["id"], "part": "cover", "place": "when-clear"}
    wait_for(api, team, api.send_file(uploads, cover, second), ["done"])

    path = f"/api/sites/{site['id']}"
    layers = {layer["part"]: layer for layer in api.json("GET", path)["layers"]}
    api.json("PUT", f"{path}/layers/{layers['habitat']['id']}/classes", {"classes": settings["classes"]})
    api.json("PUT", f"{path}/plant", settings["plant"])
    return api.json("PUT", f"{path}/outlook", settings["outlook"])


def write_spec(api, site, settings, out):
    """Fetches the rasters as they lie on the site's grid and writes a RunSpec (docs/run-spec.md) that names them."""
    raster = {}
    for layer in site["layers"]:
        file = out / f"{layer['part']}.tif"
        api.save(f"/api/sites/{site['id']}/layer-files/{layer['hash']}", file)
        if hashlib.sha256(file.read_bytes()).hexdigest() != layer["hash"]:
            raise Refused(f"{file} came damaged; fetch it again.")
        raster[layer["part"]] = {"file": file.name, "sha256": layer["hash"]}

    def by_class(what):
        return {**raster["habitat"], "classes": {str(row["value"]): row[what] for row in settings["classes"]}}

    outlook = site["outlook"]
    spec = {
        "version": 1,
        "seed": settings["seed"],
        **{name: outlook[name] for name in ("surveyYear", "years", "stepsPerYear", "boundary", "droughtIndex")},
        "rates": site["plant"]["rates"],
        "layers": {"capacity": by_class("capacity"), "vigour": by_class("vigour"), "cover": raster["cover"]},
    }
    file = out / "spec.json"
    file.write_text(json.dumps(spec, indent=2))
    return file


def simulate(product, spec, result):
    """Runs the engine on this machine, as pages do in browsers; the server runs nothing."""
    command = ["npm", "run", "-s", "simulate", "--", str(spec.resolve()), "--out", str(result.resolve())]
    subprocess.run(command, cwd=product, check=True)
    summary = json.loads((result / "summary.json").read_text())
    print(f"simulated; digest {summary['digest']}")


def fetch(api, run_id, out):
    """Everything of a run that is stored: spec and rasters as ZIP, series as CSV, closing years and last cover as GeoTIFF."""
    run = api.json("GET", f"/api/runs/{run_id}")
    path = f"/api/runs/{run_id}"
    api.save(f"{path}/files.zip", out / "files.zip")
    if run["status"] != "finished":
        raise Refused(f"The run is {run['status']}; its series and maps are there once a browser has finished it.")
    api.save(f"{path}/series.csv", out / "series.csv")
    api.save(f"{path}/closing.tif", out / "closing.tif")
    last = run["storedYears"][-1]
    api.save(f"{path}/cover/{last}", out / f"cover-{last}.tif")


def main():
    parser = argparse.ArgumentParser(description=__doc__, formatter_class=argparse.RawDescriptionHelpFormatter)
    commands = parser.add_subparsers(dest="command", required=True)
    site = commands.add_parser("site", help="make a site and simulate it")
    site.add_argument("url")
    for name in ("habitat", "cover", "settings", "out"):
        site.add_argument(name, type=pathlib.Path)
    site.add_argument("--name", default="Made by a script")
    site.add_argument("--team", help="name of the team, where the token reaches several")
    site.add_argument("--product", type=pathlib.Path, help="folder of Foothold; without it, nothing is simulated")
    run = commands.add_parser("fetch", help="fetch what is stored of a run")
    run.add_argument("url")
    run.add_argument("run")
    run.add_argument("out", type=pathlib.Path)
    given = parser.parse_args()

    token = os.environ.get("FOOTHOLD_TOKEN")
    if not token:
        sys.exit("Set FOOTHOLD_TOKEN to an access token of your account page.")
    api = Foothold(given.url, token)
    given.out.mkdir(parents=True, exist_ok=True)
    try:
        if given.command == "fetch":
            fetch(api, given.run, given.out)
            return
        settings = json.loads(given.settings.read_text())
        team = choose_team(api, given.team)
        made = make_site(api, team, given.name, given.habitat, given.cover, settings)
        spec = write_spec(api, made, settings, given.out)
        if given.product:
            simulate(given.product, spec, given.out / "result")
    except Refused as refused:
        sys.exit(str(refused))


if __name__ == "__main__":
    main()
