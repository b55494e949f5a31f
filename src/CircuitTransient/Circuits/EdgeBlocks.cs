namespace CircuitTransient.Circuits;

/// <summary>The blocks of a graph: edges that lie on a loop together, however far round, are in one; an edge
/// on no loop is a block of its own. What is shared out in one block leaves the others alone.</summary>
internal static class EdgeBlocks
{
    /// <summary>The blocks, each a list of indices of edges in their order.</summary>
    /// <param name="nodes">How many nodes there are.</param>
    /// <param name="edges">The two nodes of each edge.</param>
    public static IEnumerable<int[]> Of(int nodes, IReadOnlyList<(int From, int To)> edges)
    {
        var isTree = Forest(nodes, edges);
        var (above, way, depth) = Rooted(nodes, edges, isTree);
        var sets = new DisjointSets(edges.Count);
        for (var e = 0; e < edges.Count; e++)
        {
            var (a, b) = isTree[e] ? (0, 0) : edges[e];
            while (a != b)
            {
                ref var lower = ref depth[a] >= depth[b] ? ref a : ref b;
                sets.Join(e, way[lower]);
                lower = above[lower];
            }
        }

        return Enumerable.Range(0, edges.Count).GroupBy(e => sets.Find(e).Root).Select(g => g.ToArray());
    }

    private static bool[] Forest(int nodes, IReadOnlyList<(int From, int To)> edges)
    {
        var joined = new DisjointSets(nodes);
        return [.. edges.Select(e => joined.Join(e.From, e.To))];
    }

    /// <summary>For each node its parent in the forest, the edge to it, and its depth.</summary>
    private static (int[] Above, int[] Way, int[] Depth) Rooted(
        int nodes, IReadOnlyList<(int From, int To)> edges, bool[] isTree)
    {
        var ways = Enumerable.Range(0, edges.Count).Where(e => isTree[e])
            .SelectMany(e => new[] { (Node: edges[e].From, Edge: e), (Node: edges[e].To, Edge: e) })
            .ToLookup(w => w.Node, w => w.Edge);
        var (above, way, depth) = (new int[nodes], new int[nodes], new int[nodes]);
        var isMet = new bool[nodes];
        var open = new Queue<int>(); // breadth first, which keeps the ways up short
        for (var root = 0; root < nodes; root++)
        {
            if (isMet[root])
            {
                continue;
            }

            isMet[root] = true;
            open.Enqueue(root);
            while (open.TryDequeue(out var node))
            {
                foreach (var edge in ways[node])
                {
                    var next = edges[edge].From == node ? edges[edge].To : edges[edge].From;
                    if (!isMet[next])
                    {
                        (isMet[next], above[next], way[next], depth[next]) =
                            (true, node, edge, depth[node] + 1);
                        open.Enqueue(next);
                    }
                }
            }
        }

        return (above, way, depth);
    }
}
