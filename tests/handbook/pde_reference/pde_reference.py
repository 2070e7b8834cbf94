#!/usr/bin/python3
"""Reference figures for section.toml, from a general-purpose PDE library.

Solves -div(nu grad A) = J on triangles of second-order geometry with Lagrange elements of
degree 2 to 4, on meshes graded geometrically to every steel corner and, outwards, to a far
circle where A = 0. Every figure is taken on a ladder of meshes and degrees; the spread along
the ladder is its stated uncertainty. Writes pde_reference.json beside this file.

The file is read by tests; it shares no code, mesh or formula of stress with barwall: the
forces on the steel are volume integrals of the Maxwell stress against the gradient of a smooth
cut-off function, the field at a point is the average of grad A over a small disc with a radial
weight (exact for a harmonic A, whatever the weight).
"""

import argparse
import json
import logging
import math
import pathlib
import time

import dolfinx
import gmsh
import numpy as np
import ufl
from dolfinx import fem, geometry, mesh
from dolfinx.io import gmshio
from mpi4py import MPI
from petsc4py import PETSc

MU_0 = 4e-7 * math.pi
MM = 1e-3

# The section of section.toml, in millimetres, degrees and amperes.
FRAME_OUTER, FRAME_WALL, FRAME_MU_R = (200.0, 140.0), 4.0, 800.0
PLATE_CENTRE, PLATE_SIZE, PLATE_TURN, PLATE_MU_R = (150.0, 20.0), (100.0, 6.0), 20.0, 300.0
FLAT_BARS = {"L1": (-50.0, 0.0), "L2": (0.0, 0.0), "L3": (45.0, 5.0)}
FLAT_SIZE = (8.0, 60.0)
ROUND_BARS = {"R1": (-150.0, 0.0), "R2": (-150.0, 60.0)}
ROUND_DIAMETER = 20.0
NEAR_RADIUS = 0.6  # metres
BARS = [*FLAT_BARS, *ROUND_BARS]
CURRENT = {"L1": 1000.0, "L2": -600.0, "L3": -400.0, "R1": 300.0, "R2": -300.0}
LOOPS = [("L1", "L2"), ("L2", "L3"), ("R1", "R2"), ("L1", "R1")]
# Name, position, radius of the averaging disc (clear of every outline): millimetres.
PROBES = [
    ("p1", (0.0, 45.0), 10.0),
    ("p2", (25.0, 0.0), 10.0),
    ("p3", (-75.0, 30.0), 10.0),
    ("p4", (-50.0, 50.0), 10.0),
    ("p5", (150.0, 60.0), 15.0),
    ("p6", (0.0, 100.0), 15.0),
    ("p7", (-150.0, 30.0), 15.0),
    ("p8", (300.0, 0.0), 40.0),
    ("p9", (0.0, -400.0), 100.0),
    ("p10", (0.0, 68.0), 1.8),
    ("p11", (-98.0, 0.0), 1.8),
    ("p12", (150.0, 20.0), 2.7),
]

AIR_OUT, AIR_IN, FRAME, PLATE = 1, 2, 3, 4
BAR_TAG = {name: 10 + i for i, name in enumerate(BARS)}
BOUNDARY = 1
SIDES = ("left", "right", "bottom", "top")
FACE_TAG = {(wall, side): 10 * i + k for i, wall in enumerate(("trunking", "plate"), 1)
            for k, side in enumerate(SIDES, 1)}


def plate_to_global(u, v):
    c, s = math.cos(math.radians(PLATE_TURN)), math.sin(math.radians(PLATE_TURN))
    return (PLATE_CENTRE[0] + c * u - s * v, PLATE_CENTRE[1] + s * u + c * v)


def plate_to_local(x, y):
    c, s = math.cos(math.radians(PLATE_TURN)), math.sin(math.radians(PLATE_TURN))
    x, y = x - PLATE_CENTRE[0], y - PLATE_CENTRE[1]
    return (c * x + s * y, c * y - s * x)


def steel_corners():
    """The twelve corners of steel, where grad A is singular."""
    corners = []
    for sx in (-1, 1):
        for sy in (-1, 1):
            w, h = FRAME_OUTER[0] / 2, FRAME_OUTER[1] / 2
            corners.append((sx * w, sy * h))
            corners.append((sx * (w - FRAME_WALL), sy * (h - FRAME_WALL)))
            corners.append(plate_to_global(sx * PLATE_SIZE[0] / 2, sy * PLATE_SIZE[1] / 2))
    return np.array(corners)


def box_distance(x, y, half_w, half_h):
    """Distance to a filled box centred at the origin."""
    return math.hypot(max(abs(x) - half_w, 0.0), max(abs(y) - half_h, 0.0))


def nearest_side(x, y, size):
    """The side of a rectangle about the origin that is nearest to a point."""
    ways = (x + size[0] / 2, size[0] / 2 - x, y + size[1] / 2, size[1] / 2 - y)
    return SIDES[ways.index(min(ways))]


def tag_faces(steel, side_at, tags):
    """Groups the edges of a surface of steel by the side nearest to their middles.

    `side_at` gives the side at a point in millimetres.
    """
    groups = {}
    for d, t in gmsh.model.getBoundary([(2, t) for t in steel], oriented=False):
        box = gmsh.model.getBoundingBox(d, t)
        side = side_at((box[0] + box[3]) / 2 / MM, (box[1] + box[4]) / 2 / MM)
        groups.setdefault(side, []).append(t)
    for side, curves in groups.items():
        gmsh.model.addPhysicalGroup(1, curves, tags[side])


def flip_flat_triangles(surface):
    """Replaces triangles without area, whose three nodes lie on one straight outline.

    Rounding makes such outlines bulge, and the mesher fills the bulge. The longest edge of the
    flat triangle is swapped with its neighbour's, which leaves two sound triangles.
    """
    tags, points, parameters = gmsh.model.mesh.getNodes(2, surface, returnParametricCoord=True)
    all_tags, all_points, _ = gmsh.model.mesh.getNodes()
    where = np.zeros((int(all_tags.max()) + 1, 2))
    where[all_tags.astype(int)] = all_points.reshape(-1, 3)[:, :2]
    _, corners = gmsh.model.mesh.getElementsByType(2, surface)
    triangles = [tuple(int(n) for n in t) for t in corners.reshape(-1, 3)]

    def shape(t):
        """Twice the area over the square of the longest side, and the corner facing that side."""
        a, b, c = (where[n] for n in t)
        sides = [np.dot(b - c, b - c), np.dot(c - a, c - a), np.dot(a - b, a - b)]
        twice = (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0])
        return abs(twice) / max(sides), sides.index(max(sides))

    p, q, r = (where[corners.reshape(-1, 3)[:, k].astype(int)] for k in range(3))
    twice = np.abs((q - p)[:, 0] * (r - p)[:, 1] - (q - p)[:, 1] * (r - p)[:, 0])
    longest = np.max([((p - q) ** 2).sum(1), ((q - r) ** 2).sum(1), ((r - p) ** 2).sum(1)], axis=0)
    flat = set(np.flatnonzero(twice < 1e-6 * longest).tolist())
    owners = {}
    for i, t in enumerate(triangles):
        for k in range(3):
            owners.setdefault(frozenset((t[k], t[k - 2])), set()).add(i)
    while flat:
        done = set()
        for i in flat:
            _, k = shape(triangles[i])
            b, c, a = triangles[i][k], triangles[i][k - 2], triangles[i][k - 1]
            (j,) = owners[frozenset((a, c))] - {i}
            if j in flat:
                continue  # one bulge on another: outermost first
            for m in (i, j):
                for n in range(3):
                    owners[frozenset((triangles[m][n], triangles[m][n - 2]))].discard(m)
            # In the neighbour's own sense of turning, the middle node stands in for one end.
            triangles[i], triangles[j] = (
                tuple(b if n == end else n for n in triangles[j]) for end in (a, c))
            for m in (i, j):
                for n in range(3):
                    owners.setdefault(frozenset((triangles[m][n], triangles[m][n - 2])),
                                      set()).add(m)
            done.add(i)
        assert done
        flat -= done
    gmsh.model.mesh.clear([(2, surface)])
    gmsh.model.mesh.addNodes(2, surface, tags, points, parameters)
    gmsh.model.mesh.addElementsByType(surface, 2, [], [n for t in triangles for n in t])


def make_mesh(scale, radius, order=2):
    """Triangles whose sides are `scale` times a graded size; far circle of `radius` metres.

    The mesher works on a disc whose outer part, from NEAR_RADIUS on, stands for the far air:
    there each node is moved outwards to r = NEAR_RADIUS (rho / NEAR_RADIUS)^3.
    """
    radius = NEAR_RADIUS * (radius / NEAR_RADIUS) ** (1 / 3)
    gmsh.initialize()
    gmsh.option.setNumber("General.Terminal", 0)
    occ = gmsh.model.occ

    def box(cx, cy, w, h):
        return occ.addRectangle((cx - w / 2) * MM, (cy - h / 2) * MM, 0, w * MM, h * MM)

    far = occ.addDisk(0, 0, 0, radius, radius)
    near = occ.addDisk(0, 0, 0, NEAR_RADIUS, NEAR_RADIUS)
    outer = box(0, 0, *FRAME_OUTER)
    inner = box(0, 0, FRAME_OUTER[0] - 2 * FRAME_WALL, FRAME_OUTER[1] - 2 * FRAME_WALL)
    plate = box(*PLATE_CENTRE, *PLATE_SIZE)
    occ.rotate([(2, plate)], PLATE_CENTRE[0] * MM, PLATE_CENTRE[1] * MM, 0, 0, 0, 1,
               math.radians(PLATE_TURN))
    bars = {n: box(*c, *FLAT_SIZE) for n, c in FLAT_BARS.items()}
    for n, c in ROUND_BARS.items():
        bars[n] = occ.addDisk(c[0] * MM, c[1] * MM, 0, ROUND_DIAMETER / 2 * MM,
                              ROUND_DIAMETER / 2 * MM)
    tools = [(2, t) for t in (near, outer, inner, plate, *bars.values())]
    _, pieces = occ.fragment([(2, far)], tools)
    occ.synchronize()
    names = ["far", "near", "outer", "inner", "plate", *bars]
    of = dict(zip(names, [{t for _, t in p} for p in pieces]))
    regions = {BAR_TAG[n]: of[n] for n in bars}
    flat = set().union(*(of[n] for n in FLAT_BARS))
    regions[AIR_IN] = of["inner"] - flat
    regions[FRAME] = of["outer"] - of["inner"]
    regions[PLATE] = of["plate"]
    regions[AIR_OUT] = of["far"].difference(of["outer"], of["plate"], of["R1"], of["R2"])
    for tag, surfaces in regions.items():
        assert len(surfaces) == (2 if tag == AIR_OUT else 1)
        gmsh.model.addPhysicalGroup(2, sorted(surfaces), tag)
    rim = [t for d, t in gmsh.model.getBoundary([(2, t) for t in of["far"]], oriented=False)
           if gmsh.model.getBoundingBox(d, t)[3] > 0.99 * radius]
    assert len(rim) == 1
    gmsh.model.addPhysicalGroup(1, rim, BOUNDARY)
    tag_faces(regions[FRAME], lambda x, y: ("trunking", nearest_side(x, y, FRAME_OUTER)), FACE_TAG)
    tag_faces(regions[PLATE],
              lambda x, y: ("plate", nearest_side(*plate_to_local(x, y), PLATE_SIZE)), FACE_TAG)

    corners = steel_corners()
    smallest = 2e-3 * scale**3  # mm; the strip left ungraded shrinks faster than the mesh
    c, s = math.cos(math.radians(PLATE_TURN)), math.sin(math.radians(PLATE_TURN))
    spots = [(p[0], p[1], r / 3) for _, p, r in PROBES]
    tip = min(corners, key=lambda q: math.hypot(q[0] - 102.0, q[1] - 5.7))
    spots.append(((tip[0] + 100.0) / 2, tip[1], 0.5))  # the narrow gap of trunking and plate

    def size(dim, tag, x, y, z):
        x, y = x / MM, y / MM
        r = math.hypot(x, y)
        h = min(4.0 + 0.35 * max(r - 120.0, 0.0), max(0.2 * r, 100.0))
        d = math.sqrt(((corners[:, 0] - x) ** 2 + (corners[:, 1] - y) ** 2).min())
        h = min(h, smallest + 0.35 * d)
        w2, h2 = FRAME_OUTER[0] / 2, FRAME_OUTER[1] / 2
        d = box_distance(x, y, w2, h2)
        if d == 0.0:
            d = max(0.0, min(w2 - abs(x), h2 - abs(y)) - FRAME_WALL)
        h = min(h, 2.0 + 0.3 * d)
        u, v = x - PLATE_CENTRE[0], y - PLATE_CENTRE[1]
        d = box_distance(c * u + s * v, c * v - s * u, PLATE_SIZE[0] / 2, PLATE_SIZE[1] / 2)
        h = min(h, 2.0 + 0.3 * d)
        for bx, by in FLAT_BARS.values():
            # Corners of a current sheet: A is smooth there but for r^2 log r.
            d = math.hypot(abs(x - bx) - FLAT_SIZE[0] / 2, abs(y - by) - FLAT_SIZE[1] / 2)
            h = min(h, 0.3 + 0.35 * d)
        for bx, by in ROUND_BARS.values():
            d = abs(math.hypot(x - bx, y - by) - ROUND_DIAMETER / 2)
            h = min(h, 2.5 + 0.3 * d)
        for px, py, p in spots:
            h = min(h, p + 0.3 * math.hypot(x - px, y - py))
        return scale * h * MM

    gmsh.model.mesh.setSizeCallback(size)
    for key in ("MeshSizeFromPoints", "MeshSizeFromCurvature", "MeshSizeExtendFromBoundary"):
        gmsh.option.setNumber("Mesh." + key, 0)
    gmsh.option.setNumber("Mesh.MeshSizeMax", radius)
    gmsh.option.setNumber("Mesh.Algorithm", 6)
    gmsh.model.mesh.generate(2)
    for _, surface in gmsh.model.getEntities(2):
        flip_flat_triangles(surface)
    gmsh.model.mesh.setOrder(order)
    domain, cells, facets = gmshio.model_to_mesh(gmsh.model, MPI.COMM_SELF, 0, gdim=2)
    gmsh.finalize()
    nodes = domain.geometry.x
    rho = np.hypot(nodes[:, 0], nodes[:, 1])
    nodes *= (np.maximum(rho / NEAR_RADIUS, 1.0) ** 2)[:, None]
    return domain, cells, facets


def smooth_step(t):
    """0 below 0, 1 above 1, twice continuously differentiable."""
    t = ufl.conditional(ufl.lt(t, 0), 0.0, ufl.conditional(ufl.gt(t, 1), 1.0, t))
    return t**3 * (10 - 15 * t + 6 * t**2)


def positive(t):
    return ufl.conditional(ufl.gt(t, 0), t, 0.0)


def cut_offs(x):
    """Functions of position: 1 near the named body, 0 near every other, smooth in the air."""
    def box(u, v, w, h):
        # A hundredth of a millimetre keeps the gradient finite on the outline itself.
        return ufl.sqrt(positive(abs(u) - w / 2 * MM) ** 2 + positive(abs(v) - h / 2 * MM) ** 2
                        + (0.01 * MM) ** 2)

    c, s = math.cos(math.radians(PLATE_TURN)), math.sin(math.radians(PLATE_TURN))
    u, v = x[0] - PLATE_CENTRE[0] * MM, x[1] - PLATE_CENTRE[1] * MM
    distance = {"trunking": box(x[0], x[1], *FRAME_OUTER),
                "plate": box(c * u + s * v, c * v - s * u, *PLATE_SIZE)}
    for n, (bx, by) in ROUND_BARS.items():
        beyond = positive(ufl.sqrt((x[0] - bx * MM) ** 2 + (x[1] - by * MM) ** 2)
                          - ROUND_DIAMETER / 2 * MM)
        distance[n] = ufl.sqrt(beyond**2 + (0.01 * MM) ** 2)
    result = {}
    for body in distance:
        # A smooth minimum of the distances to all others, and of 100 mm to close the band.
        other = sum(1 / d**2 for n, d in distance.items() if n != body) + 1 / (100 * MM) ** 2
        ratio = distance[body] * ufl.sqrt(other)  # own distance over that of the others
        result[body] = 1 - smooth_step((ratio / (1 + ratio) - 0.15) / 0.7)
    # Inside the trunking: 1 near the wall, 0 round the three bars.
    sx = smooth_step((abs(x[0]) - 58 * MM) / (34 * MM))
    sy = smooth_step((abs(x[1]) - 39 * MM) / (24 * MM))
    inside = 1 - (1 - sx) * (1 - sy)
    return result, inside


def surface_forces(domain, cells, facets, stress, steel, tags):
    """Stress of the air on the surfaces of steel [N/m]: of each group of edges, x and y."""
    is_air = fem.Function(fem.FunctionSpace(domain, ("DG", 0)))
    is_air.x.array[:] = 1.0
    for tag in steel:
        is_air.x.array[cells.find(tag)] = 0.0
    surface = ufl.Measure("dS", domain=domain, subdomain_data=facets,
                          metadata={"quadrature_degree": 14})
    pull = -is_air * ufl.dot(stress, ufl.FacetNormal(domain))
    return {name: [fem.assemble_scalar(fem.form((pull[i]("+") + pull[i]("-")) * surface(tag)))
                   for i in (0, 1)] for name, tag in tags.items()}


def run(scale, degree, radius, steel=True):
    """Figures, checks and size on one mesh with one degree; figures: address -> (value, unit)."""
    domain, cells, facets = make_mesh(scale, radius)
    space = fem.FunctionSpace(domain, ("Lagrange", degree))
    constants = fem.FunctionSpace(domain, ("DG", 0))
    nu = fem.Function(constants)
    nu.x.array[:] = 1 / MU_0
    if steel:
        nu.x.array[cells.find(FRAME)] = 1 / (MU_0 * FRAME_MU_R)
        nu.x.array[cells.find(PLATE)] = 1 / (MU_0 * PLATE_MU_R)
    dx = ufl.Measure("dx", domain=domain, subdomain_data=cells)
    exact = {"quadrature_degree": 2 * degree + 2}

    def integral(form):
        return fem.assemble_scalar(fem.form(form))

    one = fem.Constant(domain, PETSc.ScalarType(1))
    area = {n: integral(one * dx(BAR_TAG[n], metadata=exact)) for n in BARS}
    trial, test = ufl.TrialFunction(space), ufl.TestFunction(space)
    rim = fem.locate_dofs_topological(space, 1, facets.find(BOUNDARY))
    bc = fem.dirichletbc(PETSc.ScalarType(0), rim, space)
    matrix = fem.petsc.assemble_matrix(
        fem.form(nu * ufl.inner(ufl.grad(trial), ufl.grad(test)) * dx(metadata=exact)), bcs=[bc])
    matrix.assemble()
    ksp = PETSc.KSP().create(MPI.COMM_SELF)
    ksp.setOperators(matrix)
    ksp.setType("preonly")
    ksp.getPC().setType("lu")
    ksp.getPC().setFactorSolverType("mumps")

    def solve(current):
        """A for the total currents given [A]; A = 0 on the far circle."""
        load = sum(i / area[n] * test * dx(BAR_TAG[n], metadata=exact) for n, i in current.items())
        rhs = fem.petsc.assemble_vector(fem.form(load))
        fem.petsc.set_bc(rhs, [bc])
        solution = fem.Function(space)
        ksp.solve(rhs, solution.vector)
        # One round of refinement: the coefficients span nine decades of cell size.
        residual = rhs - matrix * solution.vector
        correction = rhs.duplicate()
        ksp.solve(residual, correction)
        solution.vector.axpy(1.0, correction)
        residual = rhs - matrix * solution.vector
        checks["residual of the equations, relative"] = max(
            residual.norm() / rhs.norm(), checks.get("residual of the equations, relative", 0.0))
        return solution

    def mean(function, name):
        return integral(function * dx(BAR_TAG[name], metadata=exact)) / area[name]

    figures, checks = {}, {}
    potential = solve(CURRENT)
    slope = ufl.grad(potential)
    b = ufl.as_vector((slope[1], -slope[0]))
    true_area = {FRAME: FRAME_OUTER[0] * FRAME_OUTER[1]
                 - (FRAME_OUTER[0] - 2 * FRAME_WALL) * (FRAME_OUTER[1] - 2 * FRAME_WALL),
                 PLATE: PLATE_SIZE[0] * PLATE_SIZE[1],
                 BAR_TAG["L1"]: FLAT_SIZE[0] * FLAT_SIZE[1],
                 BAR_TAG["R1"]: math.pi * ROUND_DIAMETER**2 / 4}
    for tag, a in true_area.items():
        checks[f"area of region {tag} over the drawn, less 1"] = (
            integral(one * dx(tag, metadata=exact)) / (a * MM**2) - 1)

    # J x B with J along z: (-J B_y, J B_x).
    for n in BARS:
        j = CURRENT[n] / area[n]
        region = dx(BAR_TAG[n], metadata=exact)
        figures[f"bars/{n}/force_x"] = (integral(-j * b[1] * region), "N/m")
        figures[f"bars/{n}/force_y"] = (integral(j * b[0] * region), "N/m")
        figures[f"bars/{n}/flux_linkage"] = (mean(potential, n), "Wb/m")

    x = ufl.SpatialCoordinate(domain)
    outside, inside = cut_offs(x)
    stress = (ufl.outer(b, b) - 0.5 * ufl.dot(b, b) * ufl.Identity(2)) / MU_0
    fine = {"quadrature_degree": 14}

    def band_force(weight, region):
        force = -ufl.dot(stress, ufl.grad(weight))
        return [integral(force[i] * dx(region, metadata=fine)) for i in (0, 1)]

    plate = band_force(outside["plate"], AIR_OUT)
    enclosure = band_force(outside["trunking"], AIR_OUT)  # the trunking and all within it
    inner_face = band_force(inside, AIR_IN)
    for i, axis in enumerate("xy"):
        within = sum(figures[f"bars/{n}/force_{axis}"][0] for n in FLAT_BARS)
        figures[f"walls/trunking/force_{axis}"] = (enclosure[i] - within, "N/m")
        figures[f"walls/plate/force_{axis}"] = (plate[i], "N/m")
        # Air in the trunking carries as much to the inner face as the bars take.
        checks[f"bars against stress inside, {axis}"] = inner_face[i] + within
        checks[f"sum of all forces, {axis}"] = (
            enclosure[i] + plate[i] + sum(figures[f"bars/{n}/force_{axis}"][0] for n in ROUND_BARS))
        for n in ROUND_BARS:
            checks[f"{n} against stress, {axis}"] = (
                band_force(outside[n], AIR_OUT)[i] - figures[f"bars/{n}/force_{axis}"][0])

    faces = surface_forces(domain, cells, facets, stress, (FRAME, PLATE), FACE_TAG)
    for (wall, side), force in faces.items():
        for i, axis in enumerate("xy"):
            figures[f"walls/{wall}/faces/{side}/force_{axis}"] = (force[i], "N/m")
    for wall in ("trunking", "plate"):
        for i, axis in enumerate("xy"):
            checks[f"faces less {wall}, {axis}"] = (
                sum(f[i] for (w, _), f in faces.items() if w == wall)
                - figures[f"walls/{wall}/force_{axis}"][0])

    for go, back in LOOPS:
        unit = solve({go: 1.0, back: -1.0})
        figures[f"loops/{go}-{back}/inductance"] = (mean(unit, go) - mean(unit, back), "H/m")

    figures["energy"] = (0.5 * sum(CURRENT[n] * figures[f"bars/{n}/flux_linkage"][0]
                                   for n in BARS), "J/m")
    checks["energy of the field less energy of the currents"] = (
        integral(0.5 * nu * ufl.dot(b, b) * dx(metadata=exact)) - figures["energy"][0])
    for name, tag in (("trunking", FRAME), ("plate", PLATE)):
        region = dx(tag, metadata=fine)
        figures[f"walls/{name}/b_mean"] = (
            integral(ufl.sqrt(ufl.dot(b, b)) * region) / integral(one * region), "T")

    # Averages over discs, each on its own cells; grad A at the very point as a check.
    corner = domain.geometry.x[domain.geometry.dofmap.array.reshape(cells.values.size, -1)[:, :3]]
    reach = np.linalg.norm(corner - np.roll(corner, 1, axis=1), axis=2).max(axis=1)
    mark = np.zeros(cells.values.size, dtype=np.int32)
    for i, (_, p, r) in enumerate(PROBES):
        away = np.hypot(corner[:, :, 0] - p[0] * MM, corner[:, :, 1] - p[1] * MM).min(axis=1)
        mark[away < r * MM + reach] = i + 1
    discs = ufl.Measure("dx", domain=domain, subdomain_data=mesh.meshtags(
        domain, 2, np.arange(mark.size, dtype=np.int32), mark))
    tree = geometry.BoundingBoxTree(domain, 2)
    broken = fem.VectorFunctionSpace(domain, ("DG", degree - 1))
    b_cells = fem.Function(broken)
    b_cells.interpolate(fem.Expression(b, broken.element.interpolation_points()))
    for i, (name, p, r) in enumerate(PROBES):
        t = ((x[0] - p[0] * MM) ** 2 + (x[1] - p[1] * MM) ** 2) / (r * MM) ** 2
        kernel = positive(1 - t) ** 4
        region = discs(i + 1, metadata={"quadrature_degree": 16})
        weight = integral(kernel * region)
        checks[f"{name} weight of the disc"] = weight * 5 / (math.pi * (r * MM) ** 2) - 1
        bx, by = (integral(kernel * b[k] * region) / weight for k in (0, 1))
        figures[f"probes/{name}/b_x"] = (bx, "T")
        figures[f"probes/{name}/b_y"] = (by, "T")
        figures[f"probes/{name}/b"] = (math.hypot(bx, by), "T")
        point = np.array([[p[0] * MM, p[1] * MM, 0.0]])
        hit = geometry.compute_colliding_cells(
            domain, geometry.compute_collisions(tree, point), point).links(0)[0]
        local = b_cells.eval(point, [hit]).ravel()
        checks[f"{name} at the point less average"] = float(np.hypot(local[0] - bx, local[1] - by))
    size = {"cells": int(mark.size), "unknowns": int(space.dofmap.index_map.size_global)}
    return figures, checks, size


def no_steel_checks(figures):
    """Largest departures of a solution without steel from closed forms and plain quadrature."""
    nodes, weights = np.polynomial.legendre.leggauss(60)
    lines = []  # position [m] and current [A] of filaments that stand for the bars
    for n, (bx, by) in FLAT_BARS.items():
        for u, wu in zip(nodes, weights):
            for v, wv in zip(nodes, weights):
                lines.append(((bx + u * FLAT_SIZE[0] / 2) * MM, (by + v * FLAT_SIZE[1] / 2) * MM,
                              CURRENT[n] * wu * wv / 4))
    for n, (bx, by) in ROUND_BARS.items():
        lines.append((bx * MM, by * MM, CURRENT[n]))
    lines = np.array(lines)
    worst = 0.0
    for name, p, _ in PROBES:
        dx, dy = p[0] * MM - lines[:, 0], p[1] * MM - lines[:, 1]
        k = MU_0 / (2 * math.pi) * lines[:, 2] / (dx**2 + dy**2)
        bx, by = -(k * dy).sum(), (k * dx).sum()
        worst = max(worst, math.hypot(figures[f"probes/{name}/b_x"][0] - bx,
                                      figures[f"probes/{name}/b_y"][0] - by) / math.hypot(bx, by))
    spacing = ROUND_BARS["R2"][1] - ROUND_BARS["R1"][1]
    closed = MU_0 / math.pi * (math.log(spacing / (ROUND_DIAMETER / 2)) + 0.25)
    return {
        "field at the probes against the Biot-Savart sum, relative": worst,
        "inductance of the round pair against its closed form, relative":
            figures["loops/R1-R2/inductance"][0] / closed - 1,
        "force on what is no steel, N/m":
            max(abs(figures[f"walls/{n}/force_{a}"][0]) for n in ("trunking", "plate")
                for a in "xy"),
    }


def limit_of(first, second, third):
    """Richardson's limit of three values on meshes refined by one ratio; null if unordered."""
    a, b = second - first, third - second
    if a * b <= 0 or abs(b) >= 0.7 * abs(a):
        return None
    return third + b * b / (a - b)


RADIUS = 600.0  # metres; the field's own share of A = 0 there is (0.2 / 600)^2
SCALES = (1.0, 0.7, 0.49)
DEGREES = (2, 3, 4)


def report(label, result, start):
    """Prints the size and the checks of a run that began at `start`."""
    figures, checks, size = result
    print(f"\n== {label} {size} {time.time() - start:.0f} s", flush=True)
    for k, v in checks.items():
        print(f"    {k:60s} {v: .3e}")


def document_of(case, method, ladder, wide, **further):
    """What is written of a section's ladder of meshes and degrees, and of the same with the far
    radius doubled; printed with the share of each uncertainty."""
    best = ladder[DEGREES[-1], SCALES[-1]]
    out = {}
    print(f"\n{'':44s} {'value':>17s}   relative: mesh, degree, Richardson, radius; uncertainty")
    for k, (value, unit) in best[0].items():
        # Differences along the ladder that ends at the value reported.
        mesh_step = abs(value - ladder[DEGREES[-1], SCALES[-2]][0][k][0])
        if "/faces/" in k:  # gathers at the corners: what is missing shrinks only as the scale does
            mesh_step *= SCALES[-1] / (SCALES[-2] - SCALES[-1])
        degree_step = abs(value - ladder[DEGREES[-2], SCALES[-1]][0][k][0])
        # The limit of the lower degree's meshes, where they have one, is a second opinion.
        limit = limit_of(*(ladder[DEGREES[-2], s][0][k][0] for s in SCALES))
        limit_step = 0.0 if limit is None else abs(value - limit)
        radius_step = abs(wide[0][k][0] - ladder[DEGREES[-1], SCALES[1]][0][k][0])
        # Relative 1e-7: rounding in cells nine decades apart in size, and the round bars' outline.
        plus_minus = max(mesh_step, degree_step, limit_step, radius_step, 1e-7 * abs(value))
        plus_minus = float(f"{plus_minus:.2g}")
        out[k] = {"value": float(f"{value:.10g}"), "unit": unit, "uncertainty": plus_minus}
        scaled = [v / abs(value) for v in (mesh_step, degree_step, limit_step, radius_step,
                                           plus_minus)]
        print(f"{k:44s} {value: .10e}  " + " ".join(f"{v:8.1e}" for v in scaled))
    return {
        "case": case,
        "method": f"Lagrange elements of degree 4 on graded triangles{method}; uncertainty: the "
                  "largest of the last mesh step, the last step of degree, the distance to "
                  "Richardson's limit of degree 3, the change on doubling the far radius, and 1e-7 of "
                  "the value; for faces the last mesh step counts 7/3 times, as it shrinks with the "
                  "scale",
        "ladder": [{"degree": d, "scale": s, **r[2], "far_radius_m": RADIUS}
                   for (d, s), r in ladder.items()],
        "checks": {k: float(f"{v:.2g}") for k, v in best[1].items()},
        **further,
        "figures": {k: v for k, v in out.items() if "/faces/" not in k},
        "faces": {k: v for k, v in out.items() if "/faces/" in k},
    }


def main():
    parser = argparse.ArgumentParser(description=__doc__.splitlines()[0])
    parser.add_argument("--out", default=pathlib.Path(__file__).with_name("pde_reference.json"))
    parser.add_argument("--quick", action="store_true", help="one coarse mesh, printed only")
    options = parser.parse_args()
    logging.disable(logging.INFO)
    start = time.time()
    if options.quick:
        quick = run(1.0, 3, RADIUS)
        report("quick", quick, start)
        for k, (v, unit) in quick[0].items():
            print(f"{k:32s} {v: .9e} {unit}")
        return

    bare = run(0.7, 3, RADIUS, steel=False)
    report("without steel", bare, start)
    bare_checks = no_steel_checks(bare[0])
    print(bare_checks, flush=True)
    ladder = {}
    for degree in DEGREES:
        for scale in SCALES:
            ladder[degree, scale] = run(scale, degree, RADIUS)
            report(f"degree {degree} scale {scale}", ladder[degree, scale], start)
    wide = run(SCALES[1], DEGREES[-1], 2 * RADIUS)
    report("twice the radius", wide, start)

    document = document_of(
        "section.toml", "", ladder, wide,
        checks_without_steel={k: float(f"{v:.2g}") for k, v in bare_checks.items()})
    pathlib.Path(options.out).write_text(json.dumps(document, indent=2) + "\n")


if __name__ == "__main__":
    main()
