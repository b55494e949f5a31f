namespace CircuitTransient.Circuits;

/// <summary>Sets of nodes that grow together, each node with a height over its set's root.</summary>
internal sealed class DisjointSets(int count)
{
    private readonly int[] parent = [.. Enumerable.Range(0, count)];
    private readonly double[] height = new double[count];

    /// <summary>The root of a node's set, and the node's height over it.</summary>
    public (int Root, double Height) Find(int node)
    {
        var sum = 0.0;
        var root = node;
        while (parent[root] != root)
        {
            sum += height[root];
            root = parent[root];
        }

        var result = (root, sum);
        while (parent[node] != root && node != root)
        {
            var next = parent[node];
            var own = height[node];
            (parent[node], height[node]) = (root, sum);
            sum -= own;
            node = next;
        }

        return result;
    }

    /// <summary>Joins two nodes, the first standing higher by a difference; false if they were joined
    /// before.</summary>
    public bool Join(int a, int b, double difference = 0)
    {
        var (rootA, heightA) = Find(a);
        var (rootB, heightB) = Find(b);
        if (rootA == rootB)
        {
            return false;
        }

        parent[rootA] = rootB;
        height[rootA] = difference + heightB - heightA;
        return true;
    }
}
