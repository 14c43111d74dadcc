"""Prints events of a .shower file as JSON, one a line. Written from FORMATS.md alone, with plain Python 3 and msgpack.

usage: stranger.py FILE EVENT...        each event by way of the index
       stranger.py FILE all             all events by way of the blocks
"""

import json
import math
import struct
import sys
import zlib

import msgpack

BLOCK_HEAD = 26


def check(holds, what):
    if not holds:
        sys.exit("not as FORMATS.md says: " + what)


class Reader:
    def __init__(self, path):
        self.file = open(path, "rb")
        first = self.read(0, 19)
        check(first[:8] == b"\xa7shower\n", "mark")
        major, minor = struct.unpack(">xHxH", first[8:14])
        check(major == 1, "major version")
        check(struct.unpack(">xI", first[14:])[0] == zlib.crc32(first[:14]), "checksum of the mark")
        tag, self.head, _ = self.block(19)
        check(tag == "head", "head first")

    def read(self, start, length):
        self.file.seek(start)
        data = self.file.read(length)
        check(len(data) == length, "length of the file")
        return data

    def block(self, start):
        """Tag, decoded payload and end of the block at a position."""
        head = self.read(start, BLOCK_HEAD)
        tag, length, payload_sum, head_sum, again = struct.unpack(">xx4sxIxIxIxI", head)
        check(zlib.crc32(head[:16]) == head_sum and again == length, "block head")
        payload = self.read(start + BLOCK_HEAD, length)
        check(zlib.crc32(payload) == payload_sum, "payload checksum")
        end = start + BLOCK_HEAD + length
        return tag.decode(), msgpack.unpackb(payload, raw=False, strict_map_key=True), end

    def chunks(self):
        """All chunks, from block to block."""
        self.file.seek(0, 2)
        size = self.file.tell()
        at = 19
        while at < size:
            tag, payload, at = self.block(at)
            if tag == "evnt":
                yield payload

    def chunk_of(self, n):
        """The chunk with event n, by way of foot, index head, directory and page."""
        self.file.seek(0, 2)
        size = self.file.tell()
        tag, (start, length), end = self.block(size - 41)
        check(tag == "foot" and end == size, "foot")
        tag, index, end = self.block(start)
        check(tag == "indx" and end == start + length, "index head")
        check(0 <= n < index["events"], "number of the event")
        k = n // index["eventsPerPage"]
        per_directory = index["pagesPerDirectory"]
        tag, directory, _ = self.block(index["directoryStart"] + k // per_directory * index["directoryBytes"])
        check(tag == "dire", "directory")
        tag, page, _ = self.block(plain(directory["pageStart"])[k % per_directory])
        check(tag == "page" and page["first"] <= n < page["first"] + page["events"], "page")
        in_page = (n - page["first"]) // index["eventsPerChunk"]
        tag, chunk, _ = self.block(plain(page["chunkStart"])[in_page])
        check(tag == "evnt" and chunk["first"] <= n < chunk["first"] + chunk["events"], "chunk")
        return chunk


CODES = {"i1": "b", "i2": "h", "i4": "i", "u1": "B", "u2": "H", "u4": "I", "u8": "Q", "f4": "f", "f8": "d"}


def plain(column):
    name, data = column
    return struct.unpack("<%d%s" % (len(data) // int(name[1]), CODES[name]), data)


def columns_of(chunk):
    """Columns by table and name: a list of rows, each an element or a tuple of them."""
    loose = zlib.decompress(chunk["deflated"], -15)
    stored = chunk["stored"]
    loose_at = stored_at = 0
    tables = {table: {} for table in chunk["rows"]}
    for group in chunk["groups"]:
        names, width, each = group["columns"], int(group["type"][1]), group.get("each", 1)
        rows = chunk["rows"][group["table"]]
        constant = group.get("constant", False)
        length = 1 if constant else rows * each
        n = length * len(names)
        data = bytearray(n * width)
        for p in range(width):
            if group.get("deflated", 0) >> p & 1:
                data[p::width] = loose[loose_at : loose_at + n]
                loose_at += n
            else:
                data[p::width] = stored[stored_at : stored_at + n]
                stored_at += n
        elements = struct.unpack("<%d%s" % (n, CODES[group["type"]]), data)
        for k, name in enumerate(names):
            values = elements[k * length : (k + 1) * length]
            if constant:
                values = values * (rows * each)
            if each > 1:
                values = [values[r * each : (r + 1) * each] for r in range(rows)]
            tables[group["table"]][name] = list(values)
    check(loose_at == len(loose) and stored_at == len(stored), "all bytes used")
    return tables


def number(value):
    return None if isinstance(value, float) and math.isnan(value) else value


def cell(value):
    if not isinstance(value, tuple):
        return number(value)
    numbers = [number(element) for element in value]
    return None if all(element is None for element in numbers) else numbers


def without_nan(value):
    if isinstance(value, dict):
        return {key: without_nan(item) for key, item in value.items()}
    if isinstance(value, list):
        return [without_nan(item) for item in value]
    return number(value)


def events_of(head, chunk):
    tables = columns_of(chunk)
    words = {"role": head["roles"], "kind": head["kinds"], "reason": head["reasons"]}
    words["channel"] = chunk.get("channels", head["channels"])
    own = tables["events"]
    start = {"entries": 0, "steps": 0, "trials": 0}
    for k in range(chunk["events"]):
        event = dict(label=None, rerun=None, status="complete", statusReason=None, outgoing=[])
        event.update(chunk["heads"][k])
        event.update(event=chunk["first"] + k, stream=number(own["stream"][k]), weight=own["weight"][k])
        merged = dict(head["sample"], **event)
        merged["process"] = dict(merged["process"], outgoing=merged.pop("outgoing"))
        out = {"head": without_nan(merged)}
        for table in ("entries", "steps", "trials"):
            if table not in chunk["rows"]:
                continue
            end = start[table] + own[table][k]
            out[table] = {}
            for name, values in tables[table].items():
                part = values[start[table] : end]
                out[table][name] = [words[name][c] for c in part] if name in words else [cell(v) for v in part]
            start[table] = end
        yield out


def main(path, wanted):
    reader = Reader(path)
    if wanted == ["all"]:
        for chunk in reader.chunks():
            for event in events_of(reader.head, chunk):
                print(json.dumps(event))
        return
    for n in map(int, wanted):
        chunk = reader.chunk_of(n)
        print(json.dumps(list(events_of(reader.head, chunk))[n - chunk["first"]]))


if __name__ == "__main__":
    main(sys.argv[1], sys.argv[2:])
