"""Prints what in JSON documents (one a line on standard input) is not as a JSON Schema says; nothing where all is.

usage: validate.py SCHEMA < documents
"""

import json
import sys

import jsonschema

with open(sys.argv[1], encoding="utf-8") as file:
    schema = json.load(file)
jsonschema.Draft202012Validator.check_schema(schema)
validator = jsonschema.Draft202012Validator(schema)
for n, line in enumerate(sys.stdin):
    for error in validator.iter_errors(json.loads(line)):
        print(f"document {n}, {error.json_path}: {error.message[:200]}")
