"""What several tests of the desk need."""

import re
from urllib.parse import urlencode

REGION = "/r/willow_breaks"
OCCURRENCE = "keydata/willow_breaks/occurrence.yaml"


def token(client, path="/"):
    """The form token of a client's session."""
    page = client.get(path).get_data(as_text=True)
    return re.search(r'name="(?:desk-)?token" (?:content|value)="([^"]+)"', page)[1]


def save(client, table, *changes, **more):
    """Saves (key, was, text) changes as the desk's script does; returns the answer."""
    form = [("table", table), *more.items()]
    for key, was, text in changes:
        form += [("key", key), ("was", was), ("text", text)]
    return client.post(
        f"{REGION}/save",
        data=urlencode(form),
        content_type="application/x-www-form-urlencoded",
        headers={"X-Desk-Token": token(client)},
    )
