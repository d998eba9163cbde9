"""validate.py SCHEMA FILE: exit 0 when FILE is valid under SCHEMA (JSON Schema), or well-formed when SCHEMA is "xml"."""
import json
import sys
import xml.dom.minidom


def refuse_repeats(pairs):
    keys = [key for key, _ in pairs]
    if len(keys) != len(set(keys)):
        raise ValueError(f"repeated key in {keys}")
    return dict(pairs)


def refuse_constant(text):
    raise ValueError(f"not JSON: {text}")


def main():
    schema, path = sys.argv[1:]
    with open(path, encoding="utf-8") as file:
        text = file.read()
    if schema == "xml":
        xml.dom.minidom.parseString(text.encode("utf-8"))
        return
    import jsonschema
    with open(schema, encoding="utf-8") as file:
        validator = jsonschema.Draft202012Validator(json.load(file))
    document = json.loads(text, object_pairs_hook=refuse_repeats, parse_constant=refuse_constant)
    problems = [f"/{'/'.join(map(str, error.path))}: {error.message[:300]}" for error in validator.iter_errors(document)]
    if problems:
        sys.exit("\n".join(problems))


main()
