#!/usr/bin/python3
"""Reference figures for saturated_section.toml, from a general-purpose PDE library.

Solves -div(nu(|grad A|) grad A) = J by Newton's method, on meshes and with elements like those of
pde_reference.py. Every figure is taken on a ladder of meshes and degrees; the spread along the
ladder is its stated uncertainty. Writes saturated_reference.json beside this file.

It shares no code with barwall. What it must share is the law between the rows of the B-H table:
class Curve holds it as solver/bh_curve.hpp states it in words. Of the case file it reads the
section, the currents and the table.
"""

import argparse
import json
import logging
import math
import pathlib
import time
import tomllib

import basix
import gmsh
import numpy as np
import ufl
from dolfinx import fem, geometry
from dolfinx.io import gmshio
from mpi4py import MPI
from petsc4py import PETSc

from pde_reference import (DEGREES, MM, MU_0, RADIUS, SCALES, SIDES, box_distance, document_of,
                           flip_flat_triangles, nearest_side, positive, report, smooth_step,
                           surface_forces, tag_faces)

HERE = pathlib.Path(__file__).parent
CASE = tomllib.loads((HERE / "saturated_section.toml").read_text())
BARS = {bar["name"]: bar["rectangle_mm"] for bar in CASE["bar"]}
CURRENT = {bar["name"]: float(bar["current_a"]) for bar in CASE["bar"]}
WALL = CASE["wall"][0]["name"]
(WIDTH, HEIGHT), THICK = (CASE["wall"][0]["frame_mm"][k] for k in ("outer", "thickness"))
PROBES = {probe["name"]: probe["at_mm"] for probe in CASE["probe"]}
NEAR_RADIUS = 0.6  # metres
AIR_OUT, AIR_IN, FRAME = 1, 2, 3
BAR_TAG = {name: 10 + i for i, name in enumerate(BARS)}
BOUNDARY = 1
FACE_TAG = {side: k for k, side in enumerate(SIDES, 11)}
SATURATED_BELOW = 10.0  # dB/dH over mu_0


class Curve:
    """H of B through the rows of a table.

    Cubics whose slopes at inner rows are harmonic means of the neighbouring secants, weighted
    w1 = 2 h_after + h_before on the secant before and w2 = h_after + 2 h_before on the one after
    (Brodlie's weights). At B = 0 the second derivative vanishes, for which the slope at the second
    row is at most twice the first secant. The last row has the slope of the parabola through three
    rows, at most vacuum's and at least half the last secant. Beyond it dH/dB = 1 / mu_0.
    """

    def __init__(self, rows):
        self.h, self.b = np.array(rows, dtype=float).T
        width = np.diff(self.b)
        secant = np.diff(self.h) / width
        slope = np.empty_like(self.b)
        w1, w2 = 2 * width[1:] + width[:-1], width[1:] + 2 * width[:-1]
        slope[1:-1] = (w1 + w2) / (w1 / secant[:-1] + w2 / secant[1:])
        slope[1] = min(slope[1], 2 * secant[0])
        slope[0] = (3 * secant[0] - slope[1]) / 2
        # The parabola through the last three rows, by its value of dH/dB at the last one.
        parabola = np.polyder(np.polyfit(self.b[-3:] - self.b[-1], self.h[-3:], 2))
        slope[-1] = max(min(np.polyval(parabola, 0.0), 1 / MU_0), secant[-1] / 2)
        self.slope, self.width = slope, width
        self.energy = np.concatenate(([0.0], np.cumsum(
            width * (self.h[1:] + self.h[:-1]) / 2 + width**2 / 12 * (slope[:-1] - slope[1:]))))

    def at(self, b):
        """H [A/m], dH/dB [m/H] and energy density [J/m3] at b >= 0 [T]."""
        k = np.clip(np.searchsorted(self.b, b, side="right") - 1, 0, self.width.size - 1)
        d = self.width[k]
        t = (b - self.b[k]) / d
        h0, h1 = self.h[k], self.h[k + 1]
        s0, s1 = d * self.slope[k], d * self.slope[k + 1]
        # Hermite's cubic, as a polynomial of t.
        c2, c3 = 3 * (h1 - h0) - 2 * s0 - s1, s0 + s1 - 2 * (h1 - h0)
        field = h0 + t * (s0 + t * (c2 + t * c3))
        slope = (s0 + t * (2 * c2 + 3 * t * c3)) / d
        energy = self.energy[k] + d * t * (h0 + t * (s0 / 2 + t * (c2 / 3 + t * c3 / 4)))
        over = b - self.b[-1]
        return (np.where(over < 0, field, self.h[-1] + over / MU_0),
                np.where(over < 0, slope, 1 / MU_0),
                np.where(over < 0, energy,
                         self.energy[-1] + self.h[-1] * over + over**2 / (2 * MU_0)))

    def reluctivity(self, b):
        """H / B [m/H]."""
        small = b < 1e-9
        return np.where(small, self.slope[0], self.at(b)[0] / np.where(small, 1.0, b))


def make_mesh(scale, radius):
    """Triangles whose sides are `scale` times a graded size; far circle of `radius` metres.

    From NEAR_RADIUS on nodes are moved outwards to r = NEAR_RADIUS (rho / NEAR_RADIUS)^3.
    """
    radius = NEAR_RADIUS * (radius / NEAR_RADIUS) ** (1 / 3)
    gmsh.initialize()
    gmsh.option.setNumber("General.Terminal", 0)
    occ = gmsh.model.occ

    def box(cx, cy, w, h):
        return occ.addRectangle((cx - w / 2) * MM, (cy - h / 2) * MM, 0, w * MM, h * MM)

    far = occ.addDisk(0, 0, 0, radius, radius)
    near = occ.addDisk(0, 0, 0, NEAR_RADIUS, NEAR_RADIUS)
    outer = box(0, 0, WIDTH, HEIGHT)
    inner = box(0, 0, WIDTH - 2 * THICK, HEIGHT - 2 * THICK)
    bars = [box(*r["centre"], *r["size"]) for r in BARS.values()]
    tools = [(2, t) for t in (near, outer, inner, *bars)]
    _, pieces = occ.fragment([(2, far)], tools)
    occ.synchronize()
    of = dict(zip(["far", "near", "outer", "inner", *BARS], [{t for _, t in p} for p in pieces]))
    regions = {BAR_TAG[n]: of[n] for n in BARS}
    regions[AIR_IN] = of["inner"].difference(*(of[n] for n in BARS))
    regions[FRAME] = of["outer"] - of["inner"]
    regions[AIR_OUT] = of["far"] - of["outer"]
    for tag, surfaces in regions.items():
        assert len(surfaces) == (2 if tag == AIR_OUT else 1)
        gmsh.model.addPhysicalGroup(2, sorted(surfaces), tag)
    rim = [t for d, t in gmsh.model.getBoundary([(2, t) for t in of["far"]], oriented=False)
           if gmsh.model.getBoundingBox(d, t)[3] > 0.99 * radius]
    assert len(rim) == 1
    gmsh.model.addPhysicalGroup(1, rim, BOUNDARY)
    tag_faces(regions[FRAME], lambda x, y: nearest_side(x, y, (WIDTH, HEIGHT)), FACE_TAG)

    corners = np.array([(sx * (WIDTH / 2 - t), sy * (HEIGHT / 2 - t))
                        for sx in (-1, 1) for sy in (-1, 1) for t in (0.0, THICK)])
    smallest = 2e-3 * scale**3  # mm; the strip left ungraded shrinks faster than the mesh

    def size(dim, tag, x, y, z):
        x, y = x / MM, y / MM
        r = math.hypot(x, y)
        h = min(5.0 + 0.35 * max(r - 160.0, 0.0), max(0.2 * r, 100.0))
        d = math.sqrt(((corners[:, 0] - x) ** 2 + (corners[:, 1] - y) ** 2).min())
        h = min(h, smallest + 0.35 * d)
        d = box_distance(x, y, WIDTH / 2, HEIGHT / 2)
        if d == 0.0:
            d = max(0.0, min(WIDTH / 2 - abs(x), HEIGHT / 2 - abs(y)) - THICK)
        h = min(h, 1.5 + 0.3 * d)
        for r in BARS.values():
            # Corners of a current sheet: A is smooth there but for r^2 log r.
            d = math.hypot(*(abs(p - c) - s / 2
                             for p, c, s in zip((x, y), r["centre"], r["size"])))
            h = min(h, 0.5 + 0.35 * d)
        return scale * h * MM

    gmsh.model.mesh.setSizeCallback(size)
    for key in ("MeshSizeFromPoints", "MeshSizeFromCurvature", "MeshSizeExtendFromBoundary"):
        gmsh.option.setNumber("Mesh." + key, 0)
    gmsh.option.setNumber("Mesh.MeshSizeMax", radius)
    gmsh.option.setNumber("Mesh.Algorithm", 6)
    gmsh.model.mesh.generate(2)
    for _, surface in gmsh.model.getEntities(2):
        flip_flat_triangles(surface)
    gmsh.model.mesh.setOrder(2)
    domain, cells, facets = gmshio.model_to_mesh(gmsh.model, MPI.COMM_SELF, 0, gdim=2)
    gmsh.finalize()
    nodes = domain.geometry.x
    rho = np.hypot(nodes[:, 0], nodes[:, 1])
    nodes *= (np.maximum(rho / NEAR_RADIUS, 1.0) ** 2)[:, None]
    return domain, cells, facets


def cut_offs(x):
    """1 at the duct's outer side, 0 far out; and 1 at its inner side, 0 round the bars."""
    beyond = [positive(abs(x[i]) - s / 2 * MM) for i, s in enumerate((WIDTH, HEIGHT))]
    # A hundredth of a millimetre keeps the gradient finite on the outline itself.
    ratio = ufl.sqrt(beyond[0] ** 2 + beyond[1] ** 2 + (0.01 * MM) ** 2) / (100 * MM)
    outside = 1 - smooth_step((ratio / (1 + ratio) - 0.15) / 0.7)
    clear = 1
    for i, s in enumerate((WIDTH, HEIGHT)):
        wall = s / 2 - THICK
        for sign in (-1, 1):
            bar = max(sign * r["centre"][i] + r["size"][i] / 2 for r in BARS.values())
            gap = wall - bar
            clear *= 1 - smooth_step((sign * x[i] - (bar + 0.1 * gap) * MM) / (0.8 * gap * MM))
    return outside, 1 - clear


class Steel:
    """H of the steel and its slope at the quadrature points, for a given A."""

    def __init__(self, domain, cells, degree, curve):
        element = ufl.FiniteElement("Quadrature", domain.ufl_cell(), degree=degree,
                                    quad_scheme="default")
        space = fem.FunctionSpace(domain, element)
        self.curve, self.cells = curve, cells.find(FRAME)
        self.points, self.weights = basix.make_quadrature(basix.CellType.triangle, degree)
        self.dofs = space.dofmap.list.array.reshape(-1, self.weights.size)[self.cells]
        self.nu, self.bend, self.energy = (fem.Function(space) for _ in range(3))
        self.metadata = {"quadrature_degree": degree, "quadrature_scheme": "default"}

    def flux_density(self, potential):
        """|B| [T], a row of points for each cell of steel."""
        slope = fem.Expression(ufl.grad(potential), self.points).eval(self.cells)
        return np.linalg.norm(slope.reshape(self.cells.size, -1, 2), axis=2)

    def take(self, potential):
        b = self.flux_density(potential)
        field, slope, energy = self.curve.at(b)
        nu = self.curve.reluctivity(b)
        self.nu.x.array[self.dofs] = nu
        # 2 d nu / d(B^2), what the derivative of nu grad A has beside nu.
        self.bend.x.array[self.dofs] = np.where(b > 1e-6, (slope - nu) / np.maximum(b, 1e-6)**2, 0)
        self.energy.x.array[self.dofs] = energy


class Field:
    """The solved field on one mesh with one degree."""

    def __init__(self, made, degree, curve, start):
        self.domain, self.cells, self.facets = made
        self.space = fem.FunctionSpace(self.domain, ("Lagrange", degree))
        self.exact = {"quadrature_degree": 2 * degree + 2}
        self.dx = ufl.Measure("dx", domain=self.domain, subdomain_data=self.cells)
        self.steel = Steel(self.domain, self.cells, 2 * degree + 4, curve)
        one = fem.Constant(self.domain, PETSc.ScalarType(1))
        self.area = {n: self.integral(one * self.dx(BAR_TAG[n], metadata=self.exact)) for n in BARS}
        self.potential = fem.Function(self.space)
        if start is not None:
            self.potential.interpolate(start)
        self.solve()

    def integral(self, form):
        return fem.assemble_scalar(fem.form(form))

    def air(self):
        """All that is no steel."""
        return self.dx((AIR_OUT, AIR_IN, *BAR_TAG.values()), metadata=self.exact)

    def iron(self):
        return self.dx(FRAME, metadata=self.steel.metadata)

    def load(self, currents, test):
        return sum(i / self.area[n] * test * self.dx(BAR_TAG[n], metadata=self.exact)
                   for n, i in currents.items())

    def total_energy(self):
        """What the solution makes smallest, for the present A [J/m]."""
        slope = ufl.grad(self.potential)
        self.steel.take(self.potential)
        return (self.integral(ufl.dot(slope, slope) / (2 * MU_0) * self.air())
                + self.integral(self.steel.energy * self.iron())
                - self.integral(self.load(CURRENT, self.potential)))

    def solve(self):
        trial, test = ufl.TrialFunction(self.space), ufl.TestFunction(self.space)
        rim = fem.locate_dofs_topological(self.space, 1, self.facets.find(BOUNDARY))
        self.bc = fem.dirichletbc(PETSc.ScalarType(0), rim, self.space)
        slope, steel = ufl.grad(self.potential), self.steel
        residual = fem.form(ufl.inner(slope, ufl.grad(test)) / MU_0 * self.air()
                            + steel.nu * ufl.inner(slope, ufl.grad(test)) * self.iron()
                            - self.load(CURRENT, test))
        tangent = fem.form(ufl.inner(ufl.grad(trial), ufl.grad(test)) / MU_0 * self.air()
                           + (steel.nu * ufl.inner(ufl.grad(trial), ufl.grad(test))
                              + steel.bend * ufl.inner(slope, ufl.grad(trial))
                              * ufl.inner(slope, ufl.grad(test))) * self.iron())
        full = fem.petsc.assemble_vector(fem.form(self.load(CURRENT, test)))
        self.ksp = PETSc.KSP().create(MPI.COMM_SELF)
        self.ksp.setType("preonly")
        self.ksp.getPC().setType("lu")
        self.ksp.getPC().setFactorSolverType("mumps")
        energy = self.total_energy()
        self.steps = 0
        while True:
            steel.take(self.potential)
            matrix = fem.petsc.assemble_matrix(tangent, bcs=[self.bc])
            matrix.assemble()
            rest = fem.petsc.assemble_vector(residual)
            fem.petsc.set_bc(rest, [self.bc], scale=0.0)
            self.residual = rest.norm() / full.norm()
            self.ksp.setOperators(matrix)
            if self.residual < 1e-10 or self.steps == 40:
                break
            step = rest.duplicate()
            self.ksp.solve(rest, step)
            before = self.potential.vector.copy()
            length = 1.0
            while True:
                self.potential.vector.waxpy(-length, step, before)
                now = self.total_energy()
                if now <= energy + 1e-12 * abs(energy) or length < 1e-3:
                    break
                length /= 2
            energy = now
            self.steps += 1
        assert self.residual < 1e-8, self.residual

    def change(self, currents):
        """Change of A with currents [A] in the bars at the operating point."""
        test = ufl.TestFunction(self.space)
        rhs = fem.petsc.assemble_vector(fem.form(self.load(currents, test)))
        fem.petsc.set_bc(rhs, [self.bc], scale=0.0)
        result = fem.Function(self.space)
        self.ksp.solve(rhs, result.vector)
        return result

    def mean(self, function, name):
        region = self.dx(BAR_TAG[name], metadata=self.exact)
        return self.integral(function * region) / self.area[name]


def exceeded_on(share, value, weight):
    """The value exceeded on a share of the whole weight."""
    order = np.argsort(value)[::-1]
    total = np.cumsum(weight[order])
    return float(np.interp(share * total[-1], total, value[order]))


def figures_of(field):
    """Figures and checks of a solved field; figures: address -> (value, unit)."""
    figures, checks, dx = {}, {}, field.dx
    checks["residual of the equations, relative"] = field.residual
    slope = ufl.grad(field.potential)
    b = ufl.as_vector((slope[1], -slope[0]))
    for n in BARS:  # J x B with J along z: (-J B_y, J B_x)
        j = CURRENT[n] / field.area[n]
        region = dx(BAR_TAG[n], metadata=field.exact)
        figures[f"bars/{n}/force_x"] = (field.integral(-j * b[1] * region), "N/m")
        figures[f"bars/{n}/force_y"] = (field.integral(j * b[0] * region), "N/m")
        figures[f"bars/{n}/flux_linkage"] = (field.mean(field.potential, n), "Wb/m")

    outside, inside = cut_offs(ufl.SpatialCoordinate(field.domain))
    stress = (ufl.outer(b, b) - 0.5 * ufl.dot(b, b) * ufl.Identity(2)) / MU_0
    fine = {"quadrature_degree": 14}

    def band_force(weight, tag):
        force = -ufl.dot(stress, ufl.grad(weight))
        return [field.integral(force[i] * dx(tag, metadata=fine)) for i in (0, 1)]

    outer_side, inner_side = band_force(outside, AIR_OUT), band_force(inside, AIR_IN)
    for i, axis in enumerate("xy"):
        on_bars = sum(figures[f"bars/{n}/force_{axis}"][0] for n in BARS)
        figures[f"walls/{WALL}/force_{axis}"] = (outer_side[i] + inner_side[i], "N/m")
        checks[f"duct and all within it, {axis}"] = outer_side[i]
        checks[f"bars against stress inside, {axis}"] = inner_side[i] + on_bars

    faces = surface_forces(field.domain, field.cells, field.facets, stress, (FRAME,), FACE_TAG)
    for i, axis in enumerate("xy"):
        checks[f"faces less duct, {axis}"] = (
            sum(f[i] for f in faces.values()) - figures[f"walls/{WALL}/force_{axis}"][0])
    for name, force in faces.items():
        for i, axis in enumerate("xy"):
            figures[f"walls/{WALL}/faces/{name}/force_{axis}"] = (force[i], "N/m")

    steel = field.steel
    volume = {"air": field.integral(ufl.dot(slope, slope) / (2 * MU_0) * field.air()),
              "steel": field.integral(steel.energy * field.iron()),
              "both": field.integral(steel.nu * ufl.dot(slope, slope) * field.iron())}
    figures["energy"] = (volume["air"] + volume["steel"], "J/m")
    figures["coenergy"] = (volume["air"] + volume["both"] - volume["steel"], "J/m")
    checks["energy and coenergy less current times linkage"] = (
        figures["energy"][0] + figures["coenergy"][0]
        - sum(CURRENT[n] * figures[f"bars/{n}/flux_linkage"][0] for n in BARS))
    go, back = BARS
    i = CURRENT[go]
    figures[f"loops/{go}-{back}/inductance_secant"] = (
        (figures[f"bars/{go}/flux_linkage"][0] - figures[f"bars/{back}/flux_linkage"][0]) / i,
        "H/m")
    unit = field.change({go: 1.0, back: -1.0})
    figures[f"loops/{go}-{back}/inductance_differential"] = (
        field.mean(unit, go) - field.mean(unit, back), "H/m")

    # Straight triangles: the share of each is twice its area times the point's weight.
    local = steel.flux_density(field.potential)
    corner = field.domain.geometry.x[field.domain.geometry.dofmap.array.reshape(
        field.cells.values.size, -1)[steel.cells, :3], :2]
    u, v = corner[:, 1] - corner[:, 0], corner[:, 2] - corner[:, 0]
    weight = np.abs(u[:, 0] * v[:, 1] - u[:, 1] * v[:, 0])[:, None] * steel.weights[None, :]
    area = WIDTH * HEIGHT - (WIDTH - 2 * THICK) * (HEIGHT - 2 * THICK)
    checks["area of the duct over the drawn, less 1"] = weight.sum() / (area * MM**2) - 1
    figures[f"walls/{WALL}/b_mean"] = (float((local * weight).sum() / weight.sum()), "T")
    figures[f"walls/{WALL}/b_high"] = (exceeded_on(0.01, local.ravel(), weight.ravel()), "T")
    saturated = steel.curve.at(local)[1] > 1 / (SATURATED_BELOW * MU_0)
    figures[f"walls/{WALL}/saturated_share"] = (
        float((saturated * weight).sum() / weight.sum()), "1")

    tree = geometry.BoundingBoxTree(field.domain, 2)
    broken = fem.VectorFunctionSpace(field.domain, ("DG", field.space.ufl_element().degree() - 1))
    b_cells = fem.Function(broken)
    b_cells.interpolate(fem.Expression(b, broken.element.interpolation_points()))
    for name, p in PROBES.items():
        point = np.array([[p[0] * MM, p[1] * MM, 0.0]])
        hits = geometry.compute_colliding_cells(
            field.domain, geometry.compute_collisions(tree, point), point).links(0)
        bx, by = np.mean([b_cells.eval(point, [hit]).ravel() for hit in hits], axis=0)
        figures[f"probes/{name}/b_x"] = (float(bx), "T")
        figures[f"probes/{name}/b_y"] = (float(by), "T")
        figures[f"probes/{name}/b"] = (math.hypot(bx, by), "T")
    return figures, checks


def run(scale, degrees, radius, start):
    """Figures, checks and size for several degrees on one mesh."""
    made = make_mesh(scale, radius)
    curve = Curve(CASE["material"][CASE["wall"][0]["material"]]["bh_points"])
    results, last = {}, None
    for degree in degrees:
        field = Field(made, degree, curve, last)
        last = field.potential
        figures, checks = figures_of(field)
        size = {"cells": int(field.cells.values.size),
                "unknowns": int(field.space.dofmap.index_map.size_global),
                "newton_steps": field.steps}
        results[degree] = (figures, checks, size)
        report(f"degree {degree} scale {scale} radius {radius}", results[degree], start)
    return results


def main():
    parser = argparse.ArgumentParser(description=__doc__.splitlines()[0])
    parser.add_argument("--quick", action="store_true", help="one coarse mesh, printed only")
    options = parser.parse_args()
    logging.disable(logging.INFO)
    start = time.time()
    if options.quick:
        for k, (v, unit) in run(1.0, (2, 3), RADIUS, start)[3][0].items():
            print(f"{k:44s} {v: .9e} {unit}")
        return
    ladder = {(d, s): r for s in SCALES for d, r in run(s, DEGREES, RADIUS, start).items()}
    wide = run(SCALES[1], DEGREES, 2 * RADIUS, start)[DEGREES[-1]]
    document = document_of("saturated_section.toml", ", Newton's method", ladder, wide)
    (HERE / "saturated_reference.json").write_text(json.dumps(document, indent=2) + "\n")


if __name__ == "__main__":
    main()
