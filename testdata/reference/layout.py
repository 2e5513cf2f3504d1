"""How the stored results are laid out, so that a change shows in few lines."""
import json


def laid_out(value, indent=0):
    """JSON with sorted keys, one line for what is short and not nested deeply."""
    line = json.dumps(value, sort_keys=True)
    if not isinstance(value, (dict, list, tuple)) or depth(value) < 2 or len(line) + indent < 110:
        return line
    pad = " " * indent
    if isinstance(value, dict):
        rows = [f"{json.dumps(k)}: {laid_out(value[k], indent + 1)}" for k in sorted(value)]
    else:
        rows = [laid_out(v, indent + 1) for v in value]
    opening, closing = "{}" if isinstance(value, dict) else "[]"
    return opening + "\n" + ",\n".join(f"{pad} {row}" for row in rows) + f"\n{pad}{closing}"


def depth(value):
    if not isinstance(value, (dict, list, tuple)):
        return 0
    return 1 + max(map(depth, value.values() if isinstance(value, dict) else value), default=0)
